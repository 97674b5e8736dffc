import type { ReactNode } from 'react';

type PhonePageProps = { header?: ReactNode; footer?: ReactNode; children: ReactNode };

/** One column that fills the phone, and stays narrow on anything wider. */
export function PhonePage({ header, footer, children }: PhonePageProps) {
  return (
    <div className="mx-auto flex min-h-dvh w-full max-w-[30rem] flex-col pt-[env(safe-area-inset-top)] pr-[env(safe-area-inset-right)] pb-[env(safe-area-inset-bottom)] pl-[env(safe-area-inset-left)]">
      {header}
      <main className="flex flex-1 flex-col px-5">{children}</main>
      {footer}
    </div>
  );
}
