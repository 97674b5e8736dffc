import { useQuery } from '@tanstack/react-query';
import type { Exposure } from '#shared/contracts/exposure.ts';
import { shareText } from '#shared/exposure/sound-dose.ts';
import { dbaText } from '#shared/exposure/sound-level.ts';
import { formatCount } from '../../lib/format.ts';
import { type Fact, Facts } from '../../ui/facts.tsx';
import { exposureQueries } from './exposure.queries.ts';

type ExposureFactsProps = { organisationId: string; sessionId: string; tenthsDba: number | null };

const toneOf = (share: number): Pick<Fact, 'tone'> => (share > 1 ? { tone: 'amber' } : {});

function factsOf({ session, week }: Exposure): Fact[] {
  if (session === null) return [];
  const { tenthsDba, minutes, isPlanned, ofWeek, ofWeekSensitive, ofDay } = session;
  const time = `${Math.ceil(minutes)} min of sound${isPlanned ? ', as planned' : ''}`;
  return [
    { label: 'Sound', value: `${dbaText(tenthsDba)}, ${time}`, isWords: true },
    { label: 'Of a week’s allowance', value: shareText(ofWeek), ...toneOf(ofWeek) },
    { label: 'The same for sensitive ears', value: shareText(ofWeekSensitive), ...toneOf(ofWeekSensitive) },
    { label: 'Of a day by NIOSH', value: shareText(ofDay), ...toneOf(ofDay) },
    {
      label: `Proctor’s week, ${formatCount(week.sessions, 'session')}`,
      value: shareText(week.ofWeek),
      ...toneOf(week.ofWeek),
    },
    ...(week.unrecorded > 0
      ? [{ label: 'Sessions of that week without a level', value: week.unrecorded, tone: 'amber' as const }]
      : []),
  ];
}

/** What the sound uses of the allowances of WHO/ITU H.870 and NIOSH; nothing until a level is recorded. */
export function ExposureFacts({ organisationId, sessionId, tenthsDba }: ExposureFactsProps) {
  const { data } = useQuery(exposureQueries.ofSession(organisationId, sessionId, tenthsDba));
  if (data === undefined || data.session === null) return null;
  return (
    <div className="flex flex-col gap-2">
      <Facts title="Exposure" facts={factsOf(data)} />
      <p className="text-soft">
        WHO/ITU H.870 allows 80 dBA for 40 h a week, 75 dBA for sensitive ears; NIOSH 85 dBA for 8 h a day.
      </p>
    </div>
  );
}
