import type { ReactNode } from 'react';
import type { Study } from '#shared/contracts/studies.ts';
import { PageHeader } from '../../../ui/page-header.tsx';
import { StatusWord } from '../../../ui/status-word.tsx';
import { stateWords } from '../study-words.ts';
import { Deviations } from './deviations.tsx';
import { Protocol } from './protocol.tsx';
import { SealFacts } from './seal-facts.tsx';
import { StudyNextStep, type StudyNextStepProps, type StudyPlaces } from './study-next-step.tsx';
import { StudyProgress } from './study-progress.tsx';
import type { UpcomingSession } from './upcoming-session.ts';
import { Versions } from './versions.tsx';

type StudyOverviewProps = {
  organisationId: string;
  study: Study;
  places: StudyPlaces & { all: string; registry: string };
  upcoming: UpcomingSession | null;
  onDiscarded: () => void;
  onClosed: () => void;
  publishing: StudyNextStepProps['publishing'];
  /** What its cables let expect, as their pages know them. */
  comparison: ReactNode;
  /** The table of its sessions. */
  sessions: ReactNode;
};

/** A study as its manager follows it: where it stands, what comes next, and what was fixed. */
export function StudyOverview({ study, places, sessions, comparison, ...acts }: StudyOverviewProps) {
  const { word, tone, meaning } = stateWords[study.state];
  const isSealed = study.state !== 'draft';
  return (
    <>
      <PageHeader
        title={study.title}
        lede={
          <>
            <StatusWord tone={tone} hasDot>
              {word}
            </StatusWord>{' '}
            {meaning}
          </>
        }
        back={{ to: places.all, label: 'All studies' }}
      />
      <div className="flex flex-col gap-10">
        <StudyNextStep study={study} places={places} {...acts} />
        {isSealed ? <StudyProgress state={study.state} draft={study.draft} progress={study.progress} /> : null}
        {isSealed ? sessions : null}
        <div className="grid gap-x-16 gap-y-10 lg:grid-cols-[minmax(0,1fr)_24rem] lg:items-start">
          <Protocol study={study} />
          <SealFacts study={study} registryTo={places.registry} />
        </div>
        {comparison}
        <Versions versions={study.versions} />
        {isSealed ? <Deviations deviations={study.deviations} /> : null}
      </div>
    </>
  );
}
