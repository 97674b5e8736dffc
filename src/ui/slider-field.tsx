import type { ComponentProps } from 'react';

type SliderProps = Omit<ComponentProps<'input'>, 'type' | 'min' | 'max' | 'value'> & {
  min: number;
  max: number;
  value: number;
  /** Read out in place of the number: "70 % right". */
  valueText: string;
  'aria-label': string;
};

/** A value set by hand or by the arrow keys; it stands above a field that takes the same as a number. */
export function SliderField({ min, max, value, valueText, ...input }: SliderProps) {
  const share = ((value - min) / (max - min)) * 100;
  return (
    <input
      {...input}
      type="range"
      min={min}
      max={max}
      value={value}
      aria-valuetext={valueText}
      style={{
        background: `linear-gradient(var(--color-copper), var(--color-copper)) 0 50% / ${share}% 6px no-repeat, linear-gradient(var(--color-edge), var(--color-edge)) 0 50% / 100% 2px no-repeat`,
      }}
      className="h-8 w-full cursor-pointer appearance-none rounded-full [&::-moz-range-thumb]:size-6 [&::-moz-range-thumb]:rounded-full [&::-moz-range-thumb]:border-4 [&::-moz-range-thumb]:border-solid [&::-moz-range-thumb]:border-copper [&::-moz-range-thumb]:bg-sheet [&::-webkit-slider-thumb]:size-6 [&::-webkit-slider-thumb]:appearance-none [&::-webkit-slider-thumb]:rounded-full [&::-webkit-slider-thumb]:border-4 [&::-webkit-slider-thumb]:border-solid [&::-webkit-slider-thumb]:border-copper [&::-webkit-slider-thumb]:bg-sheet"
    />
  );
}
