import { classNames } from './class-names.ts';

export type ButtonVariant = 'primary' | 'plain' | 'stop' | 'quiet';
export type ButtonSize = 'normal' | 'touch' | 'large';

const frame =
  'inline-flex items-center rounded border-2 text-center font-semibold cursor-pointer transition-colors ' +
  'print:hidden disabled:cursor-not-allowed aria-disabled:cursor-default';

const boxed = 'no-underline disabled:border-rule disabled:bg-transparent disabled:text-soft';

const variants: Record<ButtonVariant, string> = {
  primary: `border-copper bg-copper text-on-copper hover:border-copper-pressed hover:bg-copper-pressed ${boxed}`,
  plain: `border-edge bg-sheet text-ink hover:border-ink ${boxed}`,
  stop: `border-stop bg-transparent text-stop hover:bg-stop hover:text-page ${boxed}`,
  quiet:
    'border-transparent bg-transparent text-ink underline underline-offset-4 hover:decoration-2 disabled:text-soft',
};

const sizes: Record<ButtonSize, string> = {
  normal: 'min-h-12 justify-center gap-3 px-4 py-1.5 text-base',
  touch: 'min-h-14 w-full justify-center gap-3 px-5 py-2 text-xl',
  large: 'min-h-19 w-full justify-between gap-6 px-6 py-3 text-xl text-left',
};

/** What a button looks like, shared by the button and by the link that stands where a button would. */
export function buttonLook(variant: ButtonVariant, size: ButtonSize, className?: string): string {
  return classNames(frame, variants[variant], sizes[size], className);
}
