import { useId } from 'react';
import { classNames } from './class-names.ts';

type Option = {
  value: string;
  /** What the listener called it: A, B, X. Left out where the sentence says all. */
  letter?: string;
  sentence: string;
};

type OptionListProps = {
  /** The question; shown elsewhere, read out here. */
  legend: string;
  options: readonly Option[];
  value: string | null;
  onChange: (value: string) => void;
  disabled?: boolean;
  name?: string;
};

/** As high as a thumb likes it, and low enough that nothing scrolls while answering. */
function rowHeight(rows: number): string {
  if (rows <= 2) return 'h-[7.5rem] [@media(max-height:699px)]:h-22';
  return 'h-[7.5rem] [@media(min-height:600px)_and_(max-height:799px)]:h-22 [@media(max-height:599px)]:h-16';
}

/** The phone's answers: one ruled list, a row each; arrow keys move the choice. */
export function OptionList({ legend, options, value, onChange, disabled, name }: OptionListProps) {
  const ownName = useId();
  return (
    <fieldset disabled={disabled} className="min-w-0 border-t-2 border-edge">
      <legend className="sr-only">{legend}</legend>
      {options.map((option) => (
        <label
          key={option.value}
          className={classNames(
            'relative flex cursor-pointer items-center gap-6 border-b-2 border-edge px-5 has-disabled:cursor-default',
            rowHeight(options.length),
            'has-focus-visible:outline-3 has-focus-visible:-outline-offset-4 has-focus-visible:outline-ink',
            value === option.value &&
              'bg-copper-tint before:absolute before:inset-y-0 before:left-0 before:w-2 before:bg-copper',
          )}
        >
          <input
            type="radio"
            name={name ?? ownName}
            value={option.value}
            checked={value === option.value}
            onChange={() => onChange(option.value)}
            className="peer sr-only"
          />
          {option.letter === undefined ? null : (
            <span aria-hidden="true" className="w-11 shrink-0 text-center text-[2.875rem] leading-none font-bold">
              {option.letter}
            </span>
          )}
          <span className="min-w-0 flex-1 text-answer text-balance">{option.sentence}</span>
          <span
            aria-hidden="true"
            className="size-7 shrink-0 rounded-full border-[3px] border-edge peer-checked:border-[9px] peer-checked:border-copper"
          />
        </label>
      ))}
    </fieldset>
  );
}
