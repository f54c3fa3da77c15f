import { NavLink } from 'react-router';
import { classNames } from '../../lib/class-names';

type Props = { label: string; tabs: readonly { to: string; label: string }[] };

/** Parts of one page that have addresses of their own. */
export function Tabs({ label, tabs }: Props) {
  return (
    <nav aria-label={label} className="-mt-2 overflow-x-auto" data-screen-only>
      <ul className="flex min-w-max gap-x-5 border-b border-rule">
        {tabs.map((tab) => (
          <li key={tab.to}>
            <NavLink
              to={tab.to}
              className={({ isActive }) =>
                classNames(
                  'inline-flex min-h-11 items-center border-b-2 no-underline desk:min-h-9',
                  isActive
                    ? 'border-layout font-heading text-ink'
                    : 'border-transparent text-dim hover:text-ink',
                )
              }
            >
              {tab.label}
            </NavLink>
          </li>
        ))}
      </ul>
    </nav>
  );
}
