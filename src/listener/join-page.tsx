import { type FormEvent, useState } from 'react';
import { consentVersion, type OpenSession, seatsApi } from '#shared/contracts/seats.ts';
import { Problem } from '#shared/problem.ts';
import { contributionCommitment } from '#shared/session/answer-leaf.ts';
import { call } from '../lib/call.ts';
import { Button } from '../ui/button.tsx';
import { ConsentForm } from './consent-form.tsx';
import { PhonePage } from './phone-page.tsx';
import { randomHex, remember } from './seat-memory.ts';

const codeInAddress = () => /^\/listen\/([A-Za-z0-9]{6})$/.exec(window.location.pathname)?.[1]?.toUpperCase() ?? '';

type Found = { code: string; session: OpenSession };

function wordsOf(error: unknown): string {
  if (!(error instanceof Problem)) throw error;
  return error.errors[0]?.detail ?? error.message;
}

/** The way to a seat: the session's code, what the session is, consent. */
export function JoinPage({ onSeated }: { onSeated: (token: string) => void }) {
  const [found, setFound] = useState<Found | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const attempt = async (work: () => Promise<void>) => {
    setBusy(true);
    setProblem(null);
    await work().catch((error: unknown) => setProblem(wordsOf(error)));
    setBusy(false);
  };

  const look = (code: string) =>
    attempt(async () => setFound({ code, session: await call(seatsApi.look, { body: { code } }) }));

  const take = (code: string, place: string) =>
    attempt(async () => {
      const contribution = randomHex(32);
      const commitment = contributionCommitment(contribution);
      const body = { code, place, adult: true, agreed: true, consentVersion, commitment } as const;
      const { token } = await call(seatsApi.take, { body });
      remember(token, { contribution });
      onSeated(token);
    });

  return (
    <PhonePage>
      {found === null ? (
        <CodeForm busy={busy} problem={problem} onLook={look} />
      ) : (
        <ConsentForm
          session={found.session}
          busy={busy}
          problem={problem}
          onTake={(place) => take(found.code, place)}
          onBack={() => setFound(null)}
        />
      )}
    </PhonePage>
  );
}

type CodeFormProps = { busy: boolean; problem: string | null; onLook: (code: string) => void };

function CodeForm({ busy, problem, onLook }: CodeFormProps) {
  const [code, setCode] = useState(codeInAddress);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onLook(code);
  };
  return (
    <form onSubmit={submit} noValidate className="flex flex-1 flex-col gap-6 py-10">
      <h1 className="text-3xl">Take a seat</h1>
      <div className="flex flex-col gap-2">
        <label htmlFor="code" className="font-bold">
          Session code
        </label>
        <input
          id="code"
          value={code}
          onChange={(event) => setCode(event.target.value.toUpperCase())}
          maxLength={6}
          autoCapitalize="characters"
          autoComplete="off"
          spellCheck={false}
          aria-invalid={problem !== null}
          aria-describedby="code-note"
          className="min-h-16 rounded border-2 border-edge bg-sheet px-4 font-mono text-3xl tracking-[0.2em]"
        />
        <p id="code-note" role="status" className={problem === null ? 'text-soft' : 'text-amber'}>
          {problem ?? 'The six characters on the proctor’s screen.'}
        </p>
      </div>
      <Button type="submit" variant="primary" size="touch" busy={busy}>
        Look it up
      </Button>
    </form>
  );
}
