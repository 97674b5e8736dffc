import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { Caret } from './caret.tsx';
import { useDocumentTitle } from './document-title.ts';

type PageHeaderProps = {
  /** The page's only h1; it names the window too. */
  title: string;
  lede?: ReactNode;
  /** Where this page hangs: "All studies". */
  back?: { to: string; label: string };
  actions?: ReactNode;
};

export function PageHeader({ title, lede, back, actions }: PageHeaderProps) {
  useDocumentTitle(title);
  return (
    <div className="flex flex-col gap-4 pb-8">
      {back ? (
        <Link
          to={back.to}
          className="inline-flex min-h-8 items-center gap-1.5 self-start text-soft hover:text-ink print:hidden"
        >
          <Caret direction="left" />
          {back.label}
        </Link>
      ) : null}
      <div className="flex flex-wrap items-end justify-between gap-x-12 gap-y-5">
        <div className="flex min-w-0 max-w-3xl flex-col gap-3">
          <h1 className="text-3xl">{title}</h1>
          {lede ? <p className="text-lg text-soft">{lede}</p> : null}
        </div>
        {actions ? <div className="flex flex-wrap gap-3 print:hidden">{actions}</div> : null}
      </div>
    </div>
  );
}
