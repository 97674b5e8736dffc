import type { Report } from '#shared/contracts/reports.ts';
import { dbText, exactDbText, handlingWords, hertzText } from '#shared/levels/level-words.ts';
import { levelCheckWords } from '#shared/levels/measured-levels.ts';
import { formatDate, formatDateTime } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import { LevelPicture } from './level-picture.tsx';
import { ReportSection } from './report-section.tsx';

type Levels = NonNullable<Report['levels']>;
type Check = Levels['checks'][number];

const keyOf = ({ session, check, at }: Check) => `${session} ${check} ${at}`;
const capital = (words: string) => `${words.charAt(0).toUpperCase()}${words.slice(1)}`;

/** How well the cables matched in level: before, at half time and after, by code, channel and frequency. */
export function ReportLevels({ levels }: { levels: Levels }) {
  const checks = levels.checks.map((check) => ({ ...check, key: keyOf(check) }));
  return (
    <ReportSection
      title="Level at the load"
      lede={`Registered as ${handlingWords[levels.handling]}, tolerance ${dbText(levels.toleranceMilliDb)} between any two codes at 1 kHz. Each level is the mean of three readings.`}
    >
      <LevelPicture levels={levels} />
      <DataTable
        caption="Level match by session"
        columns={[
          {
            key: 'check',
            header: 'Measured',
            isRowHeader: true,
            cell: ({ session, check }) => `Session ${session}, ${levelCheckWords[check]}`,
          },
          {
            key: 'isIn',
            header: 'Levels',
            cell: ({ isIn, isReplaced }) => (
              <StatusWord tone={isIn ? 'held' : 'amber'}>
                {isIn ? 'in' : 'out'}
                {isReplaced ? ', measured again' : ''}
              </StatusWord>
            ),
          },
          {
            key: 'difference',
            header: 'Largest difference, dB',
            isFigure: true,
            cell: ({ differenceMilliDb }) => exactDbText(differenceMilliDb),
          },
          {
            key: 'drift',
            header: 'Moved since the start, dB',
            isFigure: true,
            cell: ({ driftMilliDb }) => (driftMilliDb === null ? '–' : exactDbText(driftMilliDb)),
          },
          { key: 'at', header: 'Recorded', cell: ({ at }) => formatDateTime(at) },
          { key: 'instrument', header: 'Instrument', cell: ({ instrument }) => instrumentWords(instrument) },
        ]}
        rows={checks}
        rowKey={({ key }) => key}
        empty={<p className="text-soft">Levels were registered, and no session came to measuring them.</p>}
      />
      {checks.length === 0 ? null : (
        <details>
          <summary className="min-h-8 cursor-pointer font-semibold">Every level</summary>
          <div className="flex flex-col gap-8 pt-4">
            {checks.map((check) => (
              <EveryLevel key={check.key} check={check} />
            ))}
          </div>
        </details>
      )}
    </ReportSection>
  );
}

function instrumentWords({ name, bandwidthHz, calibratedOn }: Check['instrument']): string {
  const calibrated = calibratedOn === null ? 'calibration unknown' : `calibrated ${formatDate(calibratedOn)}`;
  return `${name}, to ${hertzText(bandwidthHz)}, ${calibrated}`;
}

function EveryLevel({ check }: { check: Check }) {
  return (
    <DataTable
      caption={`${capital(levelCheckWords[check.check])}, session ${check.session}`}
      isCaptionShown={true}
      columns={[
        { key: 'code', header: 'Code', isRowHeader: true, cell: ({ code, cable }) => `${code}, ${cable}` },
        { key: 'channel', header: 'Channel', cell: ({ channel }) => channel },
        { key: 'frequency', header: 'Frequency', cell: ({ frequencyHz }) => hertzText(frequencyHz) },
        { key: 'level', header: 'Level, dB', isFigure: true, cell: ({ milliDb }) => exactDbText(milliDb) },
      ]}
      rows={check.levels}
      rowKey={({ code, channel, frequencyHz }) => `${code} ${channel} ${frequencyHz}`}
      empty={null}
    />
  );
}
