export const veilLook = 'fixed inset-0 z-40 bg-veil';

export const dialogLook =
  'fixed top-1/2 left-1/2 z-50 flex max-h-[calc(100dvh-2rem)] w-[calc(100vw-2rem)] max-w-xl -translate-x-1/2 ' +
  '-translate-y-1/2 flex-col gap-5 overflow-y-auto rounded border border-rule bg-page p-6 text-ink shadow-float ' +
  'sm:p-8 print:hidden';

export const dialogTitleLook = 'text-2xl font-bold';
