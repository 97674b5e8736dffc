import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { usePageTheme } from './page-theme.ts';
import { SkipLink } from './skip-link.tsx';

type PlainLayoutProps = {
  homeTo: string;
  /** Beside the name: what this page is, such as "Published 14 April, version 1". */
  context?: ReactNode;
  /** At the right end of the bar. */
  aside?: ReactNode;
  /** narrow for a form that stands alone, wide for what is read. */
  width?: 'narrow' | 'wide';
  children: ReactNode;
};

/** Signing in and everything the public sees. */
export function PlainLayout({ homeTo, context, aside, width = 'wide', children }: PlainLayoutProps) {
  usePageTheme('day');
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <header className="border-b border-rule">
        <div className="mx-auto flex w-full max-w-[86rem] flex-wrap items-center gap-x-6 gap-y-1 px-5 py-4 sm:px-8 lg:px-12 print:px-0">
          <Link to={homeTo} className="font-bold no-underline hover:underline">
            Fairlead
          </Link>
          {context ? <span className="text-soft">{context}</span> : null}
          {aside ? <span className="text-soft md:ml-auto">{aside}</span> : null}
        </div>
      </header>
      <main
        id="content"
        tabIndex={-1}
        className={`outline-none mx-auto w-full flex-1 px-5 py-8 sm:px-8 lg:px-12 lg:py-12 print:p-0 ${width === 'narrow' ? 'max-w-xl' : 'max-w-[86rem]'}`}
      >
        {children}
      </main>
    </div>
  );
}
