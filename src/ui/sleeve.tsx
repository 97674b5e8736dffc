import { classNames } from './class-names.ts';

const sizes = {
  sm: 'text-[1em]',
  md: 'text-[2.75rem]',
  huge: 'text-[clamp(3.5rem,min(31cqi,26svh),16rem)] [@media(max-height:850px)]:text-[clamp(3.5rem,min(31cqi,18svh),16rem)]',
};

type SleeveProps = {
  code: string;
  /** sm follows the text around it; huge grows with its container and the window's height. */
  size?: keyof typeof sizes;
  className?: string;
};

/** A blind code on its sleeve. No other number is ever shown like this. */
export function Sleeve({ code, size = 'md', className }: SleeveProps) {
  const plate = (
    <span
      role="img"
      aria-label={`Blind code ${code.split('').join(' ')}`}
      className={classNames(
        'relative inline-block overflow-hidden border bg-plate align-middle font-mono font-bold text-plate-ink',
        'rounded-[min(0.5em,var(--radius-sleeve))] border-plate-edge leading-none whitespace-nowrap',
        sizes[size],
        size !== 'huge' && className,
      )}
    >
      <Collar className="left-0" />
      <span aria-hidden="true" className="block px-[0.54em] py-[0.26em] tracking-[0.06em] [text-indent:0.06em]">
        {code}
      </span>
      <Collar className="right-0" />
    </span>
  );
  if (size !== 'huge') return plate;
  return <span className={classNames('@container flex w-full justify-center', className)}>{plate}</span>;
}

function Collar({ className }: { className: string }) {
  return (
    <span
      aria-hidden="true"
      className={classNames(
        'absolute inset-y-0 w-[0.24em] rounded-[min(0.24em,var(--radius-sleeve))] bg-collar print:border print:border-plate-edge',
        className,
      )}
    />
  );
}
