import type { ReactNode } from 'react';
import { usePageTheme } from './page-theme.ts';
import { SkipLink } from './skip-link.tsx';

type DimLayoutProps = {
  header?: ReactNode;
  footer?: ReactNode;
  /** The page proper; it gets all height that header and footer leave. */
  children: ReactNode;
};

/** For everything that happens while people listen. It lights neither the room nor a face, and needs no router. */
export function DimLayout({ header, footer, children }: DimLayoutProps) {
  usePageTheme('dim');
  return (
    <div className="flex min-h-dvh flex-col pt-[env(safe-area-inset-top)] pr-[env(safe-area-inset-right)] pb-[env(safe-area-inset-bottom)] pl-[env(safe-area-inset-left)]">
      {header ? <SkipLink /> : null}
      {header ? <header>{header}</header> : null}
      <main id="content" tabIndex={-1} className="flex flex-1 flex-col outline-none">
        {children}
      </main>
      {footer ? <footer>{footer}</footer> : null}
    </div>
  );
}
