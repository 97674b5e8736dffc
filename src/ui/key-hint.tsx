type KeyHintProps = {
  /** As the keyboard names them, joined by a plus sign: "Space", "Alt+V". */
  keys: string;
  'aria-hidden'?: boolean;
};

export function KeyHint({ keys, 'aria-hidden': ariaHidden }: KeyHintProps) {
  return (
    <kbd
      aria-hidden={ariaHidden}
      className="inline-block shrink-0 rounded border-[1.5px] border-current px-2 py-px font-mono text-base font-semibold whitespace-nowrap"
    >
      {keys.replaceAll('+', ' ')}
    </kbd>
  );
}
