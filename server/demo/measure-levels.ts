import { type LevelCheckName, levelChannels } from '#shared/levels/measured-levels.ts';
import type { Deps } from '../deps.ts';
import { openCodes } from '../features/codes/codes.service.ts';
import { getLevels, recordLevels } from '../features/levels/levels.service.ts';
import type { Sittings } from '../live/sittings.ts';

type Where = { readonly organisationId: string; readonly studyId: string; readonly sessionId: string };

/** What 6 m of 0.5 mm² cost into a loudspeaker whose impedance dips: in thousandths of a decibel, by frequency. */
const lossOf: Readonly<Record<number, number>> = { 100: 610, 1000: 480, 10000: 300 };
const levelMilliDb = 6_020;

/** The code holder measures every code at the load, as the program has it entered. */
export async function measureLevels(
  deps: Deps,
  sittings: Sittings,
  { organisationId, studyId, sessionId }: Where,
  codeHolder: string,
  check: LevelCheckName,
): Promise<void> {
  const who = { organisationId, userId: codeHolder, role: null };
  const sheet = await openCodes(deps, { organisationId, id: studyId }, who, 'check');
  const { codes, registered } = await getLevels(deps, sittings, who, sessionId, false);
  const isThin = (code: string) => sheet.rows.find((row) => row.code === code)?.cable.includes('0.5') === true;
  // Meters waver by thousandths of a decibel, and each reading is another one.
  let wavering = check.length;
  const reading = (code: string, frequencyHz: number) => {
    wavering = (wavering * 7 + 3) % 11;
    return levelMilliDb - (isThin(code) ? (lossOf[frequencyHz] ?? 0) : 0) + wavering - 5;
  };
  const calibratedOn = new Date(deps.clock.now() - 200 * 86_400_000).toISOString().slice(0, 10);
  await recordLevels(deps, sittings, who, sessionId, {
    check,
    unit: 'dBV',
    instrument: { name: 'Bench voltmeter, true RMS', bandwidthHz: 100_000, calibratedOn },
    rows: codes.flatMap((code) =>
      levelChannels
        .filter((channel) => channel !== 'mono')
        .flatMap((channel) =>
          (registered?.frequenciesHz ?? []).map((frequencyHz) => ({
            code,
            channel,
            frequencyHz,
            readings: [reading(code, frequencyHz), reading(code, frequencyHz), reading(code, frequencyHz)],
          })),
        ),
    ),
    asProctor: false,
    answered: [],
  });
}
