import { useEffect, useState } from 'react';
import { Button } from './button.tsx';
import { copyText } from './clipboard.ts';

type CopyButtonProps = { text: string; label?: string };

const wordsMs = 4000;

/** Copies, says so, and where copying is refused shows the text to be copied by hand. */
export function CopyButton({ text, label = 'Copy' }: CopyButtonProps) {
  const [outcome, setOutcome] = useState<'idle' | 'copied' | 'refused'>('idle');

  useEffect(() => {
    if (outcome !== 'copied') return;
    const timer = setTimeout(() => setOutcome('idle'), wordsMs);
    return () => clearTimeout(timer);
  }, [outcome]);

  async function copy() {
    setOutcome((await copyText(text)) ? 'copied' : 'refused');
  }

  return (
    <span className="inline-flex max-w-full flex-wrap items-center gap-3 print:hidden">
      <Button onClick={copy}>{label}</Button>
      <output className="font-semibold text-jacket">{outcome === 'copied' ? 'Copied' : null}</output>
      {outcome === 'refused' ? (
        <label className="flex w-full flex-col gap-1.5">
          <span className="text-soft">This browser does not let a page copy. Copy it from here:</span>
          <textarea
            readOnly
            value={text}
            onFocus={(event) => event.currentTarget.select()}
            className="rounded border-[1.5px] border-edge bg-sheet px-3 py-2 font-mono text-base"
          />
        </label>
      ) : null}
    </span>
  );
}
