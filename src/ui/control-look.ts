/** The box of everything that is typed into or chosen from. */
export const controlLook =
  'block w-full min-h-12 rounded border-[1.5px] border-edge bg-sheet px-3.5 py-2 text-base text-ink ' +
  'placeholder:text-soft hover:border-ink disabled:cursor-not-allowed disabled:bg-page disabled:text-soft ' +
  'disabled:border-rule [&[readonly]]:bg-page aria-invalid:border-amber aria-invalid:ring-1 aria-invalid:ring-amber ' +
  'aria-invalid:ring-inset print:border-ink';

/** The same box around a bare input and what stands beside it. */
export const framedLook =
  'flex w-full min-h-12 rounded border-[1.5px] border-edge bg-sheet text-ink hover:border-ink print:border-ink ' +
  'has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink ' +
  'has-disabled:border-rule has-disabled:bg-page has-aria-invalid:border-amber has-aria-invalid:ring-1 ' +
  'has-aria-invalid:ring-amber has-aria-invalid:ring-inset';

export const bareLook =
  'min-w-0 flex-1 bg-transparent px-3.5 py-2 text-base outline-none disabled:cursor-not-allowed disabled:text-soft';
