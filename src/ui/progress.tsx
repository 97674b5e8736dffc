import { useId } from 'react';

type ProgressProps = {
  label: string;
  value: number;
  max: number;
  /** The same in words: "62 of 96 answers". */
  valueText: string;
};

/** How much of a known amount is done. */
export function Progress({ label, value, max, valueText }: ProgressProps) {
  const id = useId();
  return (
    <div className="flex flex-col gap-2">
      <div className="flex flex-wrap justify-between gap-x-6">
        <label htmlFor={id} className="font-semibold">
          {label}
        </label>
        <span className="font-mono">{valueText}</span>
      </div>
      <progress
        id={id}
        value={value}
        max={max}
        aria-valuetext={valueText}
        className="h-2.5 w-full appearance-none overflow-hidden rounded-full border border-edge bg-transparent [&::-moz-progress-bar]:bg-jacket [&::-webkit-progress-bar]:bg-transparent [&::-webkit-progress-value]:bg-jacket"
      />
    </div>
  );
}
