import type { ReactNode } from 'react';
import { Link, NavLink } from 'react-router-dom';
import { classNames } from '../../ui/class-names.ts';
import { Menu } from '../../ui/menu.tsx';
import { usePageTheme } from './page-theme.ts';
import { SkipLink } from './skip-link.tsx';

type DayLayoutProps = {
  homeTo: string;
  links: ReadonlyArray<{ to: string; label: string }>;
  /** Beside the name: the organisation one is in, where there are several. */
  organisation?: ReactNode;
  /** Who is signed in: what the menu's button shows, and the items behind it (MenuItem, MenuLink ...). */
  person?: { label: string; menu: ReactNode };
  children: ReactNode;
};

const besideFromMd = 'md:order-none md:mt-0 md:w-auto md:pb-0';
const besideFromXl = 'xl:order-none xl:mt-0 xl:w-auto xl:pb-0';

/** For planning, reading and publishing. */
export function DayLayout({ homeTo, links, organisation, person, children }: DayLayoutProps) {
  usePageTheme('day');
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <header className="border-b border-rule print:hidden">
        <div className="mx-auto flex w-full max-w-[86rem] flex-wrap items-center gap-x-7 px-5 sm:px-8 lg:px-12">
          <Link to={homeTo} className="inline-flex min-h-14 items-center font-bold no-underline hover:underline">
            Fairlead
          </Link>
          {organisation ? <div className="order-2 w-full sm:order-none sm:w-auto">{organisation}</div> : null}
          <nav
            aria-label="Main"
            className={classNames('order-last -mt-2 w-full pb-1', organisation ? besideFromXl : besideFromMd)}
          >
            <ul className="flex flex-wrap gap-x-4 sm:gap-x-6">
              {links.map((link) => (
                <li key={link.to}>
                  <TopLink {...link} isExact={link.to === homeTo} />
                </li>
              ))}
            </ul>
          </nav>
          {person ? (
            <div className="ml-auto">
              <Menu label={person.label}>{person.menu}</Menu>
            </div>
          ) : null}
        </div>
      </header>
      <main
        id="content"
        tabIndex={-1}
        className="outline-none mx-auto w-full max-w-[86rem] flex-1 px-5 py-8 sm:px-8 lg:px-12 lg:py-12 print:p-0"
      >
        {children}
      </main>
    </div>
  );
}

/** Bold where one is; the hidden bold copy keeps the row from moving. */
function TopLink({ to, label, isExact }: { to: string; label: string; isExact: boolean }) {
  return (
    <NavLink
      to={to}
      end={isExact}
      data-label={label}
      className="inline-flex min-h-12 flex-col justify-center text-soft no-underline after:invisible after:block after:h-0 after:overflow-hidden after:font-bold after:content-[attr(data-label)] hover:text-ink hover:underline aria-[current=page]:font-bold aria-[current=page]:text-ink"
    >
      {label}
    </NavLink>
  );
}
