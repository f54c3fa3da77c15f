import { NavLink } from 'react-router';
import { classNames } from '../lib/class-names';
import { useCan } from '../lib/session';
import { DESTINATIONS } from './destinations';

/** The screens that the role may read, by group. */
export function RailLinks({ onGo }: { onGo?: () => void }) {
  const { can } = useCan();
  const groups = DESTINATIONS.map((group) => group.filter(({ area }) => area === null || can(area)));
  return (
    <nav aria-label="Screens" className="flex flex-col gap-3.5">
      {groups
        .filter((group) => group.length > 0)
        .map((group) => (
          <ul key={group[0]?.to} className="flex flex-col gap-0.5">
            {group.map(({ to, label, isExact }) => (
              <li key={to}>
                <NavLink
                  to={to}
                  end={isExact ?? false}
                  {...(onGo ? { onClick: onGo } : {})}
                  className={({ isActive }) =>
                    classNames(
                      'flex min-h-11 items-center border-l-3 px-[17px] text-ink no-underline hover:bg-wash desk:min-h-[34px]',
                      isActive ? 'border-layout bg-wash font-heading' : 'border-transparent',
                    )
                  }
                >
                  {label}
                </NavLink>
              </li>
            ))}
          </ul>
        ))}
    </nav>
  );
}
