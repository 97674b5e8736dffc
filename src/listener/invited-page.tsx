import { useCallback, useEffect, useState } from 'react';
import { type PersonalInvitation, personalLinkApi } from '#shared/contracts/personal-link.ts';
import { linkedConsentVersion } from '#shared/contracts/seats.ts';
import { Problem } from '#shared/problem.ts';
import { contributionCommitment } from '#shared/session/answer-leaf.ts';
import { call } from '../lib/call.ts';
import { Button } from '../ui/button.tsx';
import { buttonLook } from '../ui/button-look.ts';
import { ConsentForm } from './consent-form.tsx';
import { Invitation } from './invitation.tsx';
import { PhonePage } from './phone-page.tsx';
import { randomHex, recall, remember } from './seat-memory.ts';
import { Words } from './words.tsx';

type InvitedPageProps = { token: string; onSeated: (token: string) => void };

function wordsOf(error: unknown): string {
  if (!(error instanceof Problem)) throw error;
  return error.errors[0]?.detail ?? error.message;
}

const lookAgainMs = 10_000;

/** A personal link: the invitation until seating opens, then the way to the seat without a code. */
export function InvitedPage({ token, onSeated }: InvitedPageProps) {
  const [invitation, setInvitation] = useState<PersonalInvitation | null>(null);
  const [problem, setProblem] = useState<Problem | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const [isErased, setErased] = useState(false);

  const look = useCallback(
    () =>
      call(personalLinkApi.look, { body: { token } }).then(
        (found) => {
          setInvitation(found);
          setProblem(null);
        },
        (error: unknown) => {
          if (!(error instanceof Problem)) throw error;
          setProblem(error);
        },
      ),
    [token],
  );
  const isSettled = isErased || problem?.code === 'not-found' || invitation?.phase === 'over';
  useEffect(() => void look(), [look]);
  useEffect(() => {
    if (isSettled) return;
    const timer = setInterval(() => void look(), lookAgainMs);
    return () => clearInterval(timer);
  }, [look, isSettled]);

  const attempt = (work: () => Promise<void>) => {
    setBusy(true);
    setFault(null);
    work()
      .catch((error: unknown) => setFault(wordsOf(error)))
      .finally(() => setBusy(false));
  };

  const answer = (coming: boolean) =>
    attempt(async () => setInvitation(await call(personalLinkApi.answer, { body: { token, coming } })));
  const erase = () =>
    attempt(async () => {
      await call(personalLinkApi.erase, { body: { token } });
      setErased(true);
    });
  const take = (place: string) =>
    attempt(async () => {
      const contribution = randomHex(32);
      const commitment = contributionCommitment(contribution);
      const body = {
        token,
        place,
        adult: true,
        agreed: true,
        consentVersion: linkedConsentVersion,
        commitment,
      } as const;
      const taken = await call(personalLinkApi.takeSeat, { body });
      // The seat may be one that this phone took before; what it then committed to stays.
      if (recall(taken.token).contribution === null) remember(taken.token, { contribution });
      onSeated(taken.token);
    });

  if (isErased)
    return (
      <PhonePage>
        <Words
          title="Your address is erased"
          detail="This link has ended, and nobody who plans this study can write to you any more. What you answered so far stays under a label."
        />
      </PhonePage>
    );
  if (invitation === null) return <Before problem={problem} onRetry={() => void look()} />;
  const isSeat = invitation.phase === 'open' && invitation.seat === null;
  if (isSeat)
    return (
      <PhonePage>
        <ConsentForm isLinked session={{ ...invitation, rehearsal: false }} busy={busy} problem={fault} onTake={take} />
      </PhonePage>
    );
  return (
    <PhonePage>
      <Invitation
        invitation={invitation}
        token={token}
        busy={busy}
        problem={fault ?? (problem === null ? null : problem.message)}
        onAnswer={answer}
        onErase={erase}
        onSeat={onSeated}
      />
    </PhonePage>
  );
}

function Before({ problem, onRetry }: { problem: Problem | null; onRetry: () => void }) {
  if (problem === null)
    return (
      <PhonePage>
        <div role="status" className="flex flex-1 flex-col">
          <Words title="Opening your invitation" detail="This takes a moment." />
        </div>
      </PhonePage>
    );
  const isGone = problem.code === 'not-found' || problem.code === 'invalid-input';
  return (
    <PhonePage>
      <div role="alert" className="flex flex-1 flex-col">
        <Words
          title={isGone ? 'This link leads to no invitation' : 'Your invitation cannot be opened'}
          detail={
            problem.code === 'invalid-input'
              ? 'The link is not complete. Open it again from the mail, or copy all of it.'
              : problem.message
          }
        />
      </div>
      {isGone ? (
        <a href="/listen" className={buttonLook('plain', 'touch', 'mb-6')}>
          Enter a session code
        </a>
      ) : (
        <Button size="touch" className="mb-6" onClick={onRetry}>
          Try again
        </Button>
      )}
    </PhonePage>
  );
}
