import { useId } from 'react';

type SegmentedProps = {
  legend: string;
  options: ReadonlyArray<{ value: string; label: string }>;
  value: string | null;
  onChange: (value: string) => void;
  disabled?: boolean;
  name?: string;
};

/** One of a few words in a row, such as how sure a listener is. */
export function Segmented({ legend, options, value, onChange, disabled, name }: SegmentedProps) {
  const ownName = useId();
  return (
    <fieldset disabled={disabled} className="min-w-0">
      <legend className="mb-2 text-soft">{legend}</legend>
      <div className="grid auto-cols-fr grid-flow-col gap-2">
        {options.map((option) => (
          <label
            key={option.value}
            className="flex min-h-14 cursor-pointer items-center justify-center rounded border-2 border-edge bg-sheet px-1.5 text-center has-checked:border-copper has-checked:bg-copper-tint has-checked:font-bold has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink has-disabled:cursor-default"
          >
            <input
              type="radio"
              name={name ?? ownName}
              value={option.value}
              checked={value === option.value}
              onChange={() => onChange(option.value)}
              className="sr-only"
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
