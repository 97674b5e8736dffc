import type { ReactNode } from 'react';
import { isClosed, type Study } from '#shared/contracts/studies.ts';
import { formatCount } from '../../../lib/format.ts';
import { LinkButton } from '../../../ui/link-button.tsx';
import { CloseStudy } from './close-study.tsx';
import { DiscardDraft } from './discard-draft.tsx';
import { NextStep } from './next-step.tsx';
import { RecordDeviation } from './record-deviation.tsx';
import { SealStudy } from './seal-study.tsx';
import { SessionActs } from './session-acts.tsx';
import { type UpcomingSession, upcomingTitle, upcomingWords } from './upcoming-session.ts';

export type StudyPlaces = { edit: string; amend: string; codes: string; planSession: string; report: string };

export type StudyNextStepProps = {
  organisationId: string;
  study: Study;
  places: StudyPlaces;
  /** The session that runs, or the next one to run. */
  upcoming: UpcomingSession | null;
  onDiscarded: () => void;
  onClosed: () => void;
  /** What can be done about publishing a study that is closed. */
  publishing: { words: string; actions: ReactNode; stop: ReactNode };
};

/** The one thing to do now, by the study's state. */
export function StudyNextStep(props: StudyNextStepProps) {
  switch (props.study.state) {
    case 'draft':
      return <DraftStep {...props} />;
    case 'sealed':
      return <SealedStep {...props} />;
    case 'collecting':
      return <CollectingStep {...props} />;
    case 'closed':
    case 'published':
    case 'shelved':
      return <ClosedStep {...props} />;
  }
}

function DraftStep({ organisationId, study, places, onDiscarded }: StudyNextStepProps) {
  return (
    <NextStep
      title="Read it once more, then seal it"
      actions={
        <>
          <SealStudy organisationId={organisationId} study={study} />
          <LinkButton to={places.edit}>Edit the draft</LinkButton>
        </>
      }
      stop={
        <DiscardDraft
          organisationId={organisationId}
          studyId={study.id}
          title={study.title}
          onDiscarded={onDiscarded}
        />
      }
    >
      <p>Sealing fixes everything below before a single answer is given. That is what makes the result count.</p>
    </NextStep>
  );
}

const codesWords: Record<Study['codes'], { title: string; say: (holder: string) => string }> = {
  none: {
    title: 'The specimens are to be coded',
    say: (holder) => `${holder} draws the blind codes next. Sessions can be planned meanwhile; none can open before.`,
  },
  drawn: {
    title: 'The specimens are being sleeved',
    say: (holder) =>
      `${holder} has drawn the codes and labels the specimens. No session can open before that is confirmed.`,
  },
  confirmed: {
    title: 'Plan a session',
    say: (holder) => `${holder} has confirmed that every specimen is sleeved and coded at both ends.`,
  },
};

function SealedStep({ organisationId, study, places, upcoming }: StudyNextStepProps) {
  const { title, say } = codesWords[study.codes];
  const isCoded = study.codes === 'confirmed';
  return (
    <NextStep
      title={isCoded && upcoming ? upcomingTitle(upcoming) : title}
      actions={
        <>
          <SessionActs upcoming={upcoming} planTo={places.planSession} toPlan={study.progress.sessionsToPlan} />
          <LinkButton to={places.codes}>See where the codes stand</LinkButton>
          {study.amending.allowed ? <LinkButton to={places.amend}>Amend the protocol</LinkButton> : null}
          <RecordDeviation organisationId={organisationId} studyId={study.id} />
        </>
      }
    >
      <p>{say(study.codeHolder)}</p>
      {upcoming ? <p>{upcomingWords(upcoming)}</p> : null}
    </NextStep>
  );
}

function CollectingStep({ organisationId, study, places, upcoming, onClosed }: StudyNextStepProps) {
  const { closing, progress } = study;
  const close = <CloseStudy organisationId={organisationId} study={study} onClosed={onClosed} />;
  const isReady = closing.allowed && closing.complete;
  return (
    <NextStep
      title={titleOf(isReady, progress)}
      actions={
        <>
          {isReady ? (
            close
          ) : (
            <SessionActs upcoming={upcoming} planTo={places.planSession} toPlan={study.progress.sessionsToPlan} />
          )}
          <RecordDeviation organisationId={organisationId} studyId={study.id} />
        </>
      }
      stop={closing.allowed && !closing.complete ? close : null}
    >
      <p>{closing.allowed ? closing.why : `It cannot be closed yet. ${closing.why}`}</p>
      {upcoming ? <p>{upcomingWords(upcoming)}</p> : null}
    </NextStep>
  );
}

function titleOf(isReady: boolean, { trialsRegistered, trialsLocked }: Study['progress']): string {
  if (isReady) return 'All is in: close the study';
  const trialsLeft = trialsRegistered - trialsLocked;
  return trialsLeft > 0 ? `${formatCount(trialsLeft, 'trial')} to go` : 'All registered trials are locked';
}

const closedTitles = {
  closed: 'The result is in',
  published: 'The result is published',
  shelved: 'No result is published',
};

function ClosedStep({ study, places, publishing }: StudyNextStepProps) {
  const { state } = study;
  if (!isClosed(state)) return null;
  return (
    <NextStep
      title={closedTitles[state as keyof typeof closedTitles]}
      actions={
        <>
          <LinkButton variant={state === 'closed' ? 'primary' : 'plain'} to={places.report}>
            Read the report
          </LinkButton>
          {publishing.actions}
        </>
      }
      stop={publishing.stop}
    >
      <p>{publishing.words}</p>
    </NextStep>
  );
}
