import type { ComponentProps, MouseEvent, ReactNode } from 'react';
import { type ButtonSize, type ButtonVariant, buttonLook } from './button-look.ts';
import { classNames } from './class-names.ts';
import { KeyHint } from './key-hint.tsx';

type ButtonProps = Omit<ComponentProps<'button'>, 'aria-busy' | 'aria-disabled' | 'aria-keyshortcuts'> & {
  /** primary = the next act, one on a page; stop = ends something. */
  variant?: ButtonVariant;
  /** touch fills its row, 56 px; large is the console's next act. */
  size?: ButtonSize;
  /** Give it whenever the act can take time: both labels hold the width from the start. */
  busy?: boolean;
  busyLabel?: string;
  /** The key that does the same, such as "Space" or "Alt+V"; listening for it is the page's work. */
  keyHint?: string;
};

/** A button says what happens. While busy it keeps the focus and its width, and takes no second press. */
export function Button({
  variant = 'plain',
  size = 'normal',
  busy,
  busyLabel = 'One moment',
  keyHint,
  type = 'button',
  className,
  onClick,
  children,
  ...rest
}: ButtonProps) {
  function press(event: MouseEvent<HTMLButtonElement>) {
    if (busy) event.preventDefault();
    else onClick?.(event);
  }
  return (
    <button
      {...rest}
      type={type}
      onClick={press}
      aria-busy={busy || undefined}
      aria-disabled={busy || undefined}
      aria-keyshortcuts={keyHint}
      className={buttonLook(variant, size, className)}
    >
      {busy === undefined ? (
        <span>{children}</span>
      ) : (
        <BusyLabel busy={busy} whileBusy={busyLabel}>
          {children}
        </BusyLabel>
      )}
      {keyHint ? <KeyHint keys={keyHint} aria-hidden={true} /> : null}
    </button>
  );
}

type BusyLabelProps = { busy: boolean; whileBusy: string; children: ReactNode };

/** Both labels lie in one cell, so that the wider one sets the width and neither moves the other. */
function BusyLabel({ busy, whileBusy, children }: BusyLabelProps) {
  return (
    <span className="grid">
      <span className={classNames('col-start-1 row-start-1', busy && 'invisible')}>{children}</span>
      <span className={classNames('col-start-1 row-start-1', !busy && 'invisible')}>{whileBusy} …</span>
    </span>
  );
}
