import { useState } from 'react';
import { consentVersion, type OpenSession, seatsApi } from '#shared/contracts/seats.ts';
import { Problem } from '#shared/problem.ts';
import { contributionCommitment } from '#shared/session/answer-leaf.ts';
import { call } from '../lib/call.ts';
import { CodeForm } from './code-form.tsx';
import { ConsentForm } from './consent-form.tsx';
import { PhonePage } from './phone-page.tsx';
import { randomHex, remember } from './seat-memory.ts';

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

  const attempt = (work: () => Promise<void>) => {
    setBusy(true);
    setProblem(null);
    work()
      .catch((error: unknown) => setProblem(wordsOf(error)))
      .finally(() => setBusy(false));
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

  const goBack = () => {
    setFound(null);
    setProblem(null);
  };

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
          onBack={goBack}
        />
      )}
    </PhonePage>
  );
}
