import { type FormEvent, useRef, useState } from 'react';
import { Button } from '../ui/button.tsx';
import { buttonLook } from '../ui/button-look.ts';
import { lastSeat } from './seat-memory.ts';

const codeInAddress = () => /^\/listen\/([A-Za-z0-9]{6})$/.exec(window.location.pathname)?.[1]?.toUpperCase() ?? '';

type CodeFormProps = { busy: boolean; problem: string | null; onLook: (code: string) => void };

/** The six characters that lead to a session. */
export function CodeForm({ busy, problem, onLook }: CodeFormProps) {
  const [code, setCode] = useState(codeInAddress);
  const field = useRef<HTMLInputElement>(null);
  const seat = lastSeat();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    field.current?.focus();
    if (!busy) onLook(code);
  };
  return (
    <form onSubmit={submit} noValidate className="flex flex-1 flex-col gap-6 py-10">
      <h1 className="text-3xl">Take a seat</h1>
      <div className="flex flex-col gap-2">
        <label htmlFor="code" className="font-bold">
          Session code
        </label>
        <input
          ref={field}
          id="code"
          value={code}
          onChange={(event) => setCode(event.target.value.toUpperCase())}
          maxLength={6}
          autoCapitalize="characters"
          autoComplete="off"
          autoCorrect="off"
          spellCheck={false}
          enterKeyHint="go"
          aria-invalid={problem !== null}
          aria-describedby="code-hint code-problem"
          className="min-h-16 rounded border-2 border-edge bg-sheet px-4 font-mono text-3xl tracking-[0.2em] aria-invalid:border-amber"
        />
        <p id="code-hint" className="text-soft">
          The six characters on the proctor’s screen.
        </p>
        <p id="code-problem" role="alert" className="min-h-14 font-bold text-amber">
          {problem}
        </p>
      </div>
      <Button type="submit" variant="primary" size="touch" busy={busy}>
        Look it up
      </Button>
      {seat === null ? null : (
        <a href={`/seat#${seat}`} className={buttonLook('quiet', 'touch')}>
          Back to the seat this phone took
        </a>
      )}
    </form>
  );
}
