import type { ReactNode } from 'react';

/** One column that fills the phone, and stays narrow on anything wider. */
export function PhonePage({
  header,
  footer,
  children,
}: {
  header?: ReactNode;
  footer?: ReactNode;
  children: ReactNode;
}) {
  return (
    <div className="mx-auto flex min-h-dvh w-full max-w-[30rem] flex-col pt-[env(safe-area-inset-top)] pb-[env(safe-area-inset-bottom)]">
      {header}
      <main className="flex flex-1 flex-col px-5">{children}</main>
      {footer}
    </div>
  );
}
