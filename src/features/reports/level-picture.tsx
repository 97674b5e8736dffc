import type { Report } from '#shared/contracts/reports.ts';
import { exactDbText } from '#shared/levels/level-words.ts';
import { levelCheckWords } from '#shared/levels/measured-levels.ts';
import { gainHz } from '#shared/levels/registered-levels.ts';

type Levels = NonNullable<Report['levels']>;
type Point = { readonly code: string; readonly cable: string; readonly milliDb: number };

const rowHeight = 34;
const edge = 12;
const width = 640;
const labelWidth = 210;

/** Levels at 1 kHz of one check and channel, relative to their mean. */
function pointsOf(levels: readonly { code: string; cable: string; milliDb: number }[]): Point[] {
  const mean = levels.reduce((sum, { milliDb }) => sum + milliDb, 0) / Math.max(1, levels.length);
  return levels.map(({ code, cable, milliDb }) => ({ code, cable, milliDb: milliDb - mean }));
}

function rowsOf({ checks }: Levels) {
  return checks
    .filter(({ isReplaced }) => !isReplaced)
    .flatMap(({ session, check, levels }) => {
      const gains = levels.filter(({ frequencyHz }) => frequencyHz === gainHz);
      return [...new Set(gains.map(({ channel }) => channel))].map((channel) => ({
        label: `Session ${session}, ${levelCheckWords[check].replace(' the session', '')}, ${channel}`,
        points: pointsOf(gains.filter((level) => level.channel === channel)),
      }));
    });
}

/** Each code's level at 1 kHz around the mean of its channel; between the two lines they match. */
export function LevelPicture({ levels }: { levels: Levels }) {
  const rows = rowsOf(levels);
  if (rows.length === 0) return null;
  const cables = [...new Set(rows.flatMap(({ points }) => points.map(({ cable }) => cable)))];
  const half = levels.toleranceMilliDb / 2;
  const most = Math.max(
    half * 1.6,
    ...rows.flatMap(({ points }) => points.map(({ milliDb }) => Math.abs(milliDb) * 1.1)),
  );
  const tick = Math.floor(most * 0.9);
  const x = (milliDb: number) => labelWidth + edge + ((milliDb + most) / (2 * most)) * (width - labelWidth - 2 * edge);
  const height = rows.length * rowHeight + 30;
  const words = rows.map(
    ({ label, points }) =>
      `${label}: ${points.map(({ code, cable, milliDb }) => `${code} (${cable}) ${exactDbText(Math.round(milliDb))} dB`).join(', ')}`,
  );
  return (
    <figure className="flex max-w-3xl flex-col gap-2">
      <svg
        viewBox={`0 0 ${width} ${height}`}
        role="img"
        aria-label={`Level at 1 kHz by code. ${words.join('. ')}`}
        className="w-full"
      >
        <rect
          x={x(-half)}
          y={0}
          width={x(half) - x(-half)}
          height={rows.length * rowHeight}
          className="fill-jacket opacity-15"
        />
        {rows.map(({ label, points }, index) => {
          const y = index * rowHeight + rowHeight / 2;
          return (
            <g key={label}>
              <text x={0} y={y + 5} className="fill-ink text-[14px]">
                {label}
              </text>
              <line x1={x(-most)} x2={x(most)} y1={y} y2={y} className="stroke-rule" />
              {points.map(({ code, cable, milliDb }) =>
                cable === cables[0] ? (
                  <circle key={code} cx={x(milliDb)} cy={y} r={6} className="fill-copper" />
                ) : (
                  <rect
                    key={code}
                    x={x(milliDb) - 5.5}
                    y={y - 5.5}
                    width={11}
                    height={11}
                    className="fill-none stroke-ink stroke-2"
                  />
                ),
              )}
            </g>
          );
        })}
        {[-tick, 0, tick].map((milliDb) => (
          <text
            key={milliDb}
            x={x(milliDb)}
            y={rows.length * rowHeight + 20}
            textAnchor="middle"
            className="fill-soft font-mono text-[13px]"
          >
            {milliDb > 0 ? '+' : ''}
            {exactDbText(milliDb)}
          </text>
        ))}
      </svg>
      <figcaption className="text-soft">
        Level in dB around the mean of its channel at 1 kHz: ● {cables[0]}
        {cables[1] === undefined ? '' : `, □ ${cables[1]}`}. Within the shaded band two codes match.
      </figcaption>
    </figure>
  );
}
