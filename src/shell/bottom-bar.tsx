import { NavLink } from 'react-router';
import { classNames } from '../lib/class-names';
import { useCan } from '../lib/session';
import { AT_HAND, DESTINATIONS } from './destinations';

/** The screens within reach of a thumb. */
export function BottomBar() {
  const { can } = useCan();
  const atHand = DESTINATIONS.flat().filter(
    ({ to, area }) => AT_HAND.includes(to) && (area === null || can(area)),
  );
  return (
    <nav
      aria-label="At hand"
      data-screen-only
      className="fixed inset-x-0 bottom-0 z-30 border-t border-rule bg-sheet pb-[env(safe-area-inset-bottom)] desk:hidden"
    >
      <ul className="flex">
        {atHand.map(({ to, label, isExact }) => (
          <li key={to} className="flex-1">
            <NavLink
              to={to}
              end={isExact ?? false}
              className={({ isActive }) =>
                classNames(
                  'flex min-h-13 items-center justify-center border-t-3 px-1 text-sm no-underline',
                  isActive ? 'border-layout font-heading text-ink' : 'border-transparent text-dim',
                )
              }
            >
              {label}
            </NavLink>
          </li>
        ))}
      </ul>
    </nav>
  );
}
