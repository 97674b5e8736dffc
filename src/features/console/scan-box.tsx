import { type FormEvent, lazy, Suspense, useState } from 'react';
import { isFromScanner } from '#shared/session/label-text.ts';
import { Button } from '../../ui/button.tsx';
import type { Labels } from './use-labels.ts';

const CameraScan = lazy(() => import('./camera-scan.tsx').then(({ CameraScan }) => ({ default: CameraScan })));

type ScanBoxProps = { labels: Labels; isLost: boolean; keyHint: string | null };

/** Where a label comes in: from a scanner anywhere on the page, typed, or by the camera. */
export function ScanBox({ labels, isLost, keyHint }: ScanBoxProps) {
  const { field, isCameraOn, setCameraOn, take } = labels;
  const [fault, setFault] = useState('');
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const { current } = field;
    const text = current?.value.trim() ?? '';
    if (text === '') return setFault('Scan the label, or type its three figures.');
    setFault('');
    take(text, isFromScanner(text) ? 'scanner' : 'typed');
    if (current === null) return;
    current.value = '';
    // The space bar and the Alt keys are the console's again.
    current.blur();
  };
  return (
    <div className="flex flex-col gap-3">
      <form onSubmit={submit} className="flex flex-wrap items-stretch gap-3.5">
        <label className="flex min-w-36 flex-1 flex-col">
          <span className="sr-only">Scan, or type the code</span>
          <input
            ref={field}
            data-scan-field={true}
            name="label"
            autoComplete="off"
            autoCapitalize="characters"
            spellCheck={false}
            maxLength={64}
            placeholder="Scan, or type it"
            aria-describedby="scan-fault"
            className="min-h-19 w-full min-w-0 rounded border-2 border-edge bg-sheet px-4 font-mono text-2xl text-ink placeholder:font-sans placeholder:text-xl placeholder:text-soft"
          />
        </label>
        <Button type="submit" variant="primary" size="large" disabled={isLost} className="w-auto! text-2xl">
          Take it
        </Button>
        <Button
          size="large"
          className="w-auto! max-sm:[&_kbd]:hidden"
          aria-pressed={isCameraOn}
          onClick={() => setCameraOn(!isCameraOn)}
          {...(keyHint === null ? {} : { keyHint })}
        >
          {isCameraOn ? 'Camera off' : 'Camera'}
        </Button>
      </form>
      <p id="scan-fault" role="alert" className="font-semibold text-amber empty:hidden">
        {fault}
      </p>
      {isCameraOn ? (
        <Suspense fallback={<p role="status">The camera is being opened.</p>}>
          <CameraScan onText={(text) => take(text, 'camera')} />
        </Suspense>
      ) : null}
    </div>
  );
}
