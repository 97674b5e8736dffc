import type { ClosedStudy } from '#shared/ledger/publication-parts.ts';
import { judgeLevels } from '#shared/levels/compare-levels.ts';
import { perUnit } from '#shared/levels/level-units.ts';
import type { MeasuredLevels } from '#shared/levels/measured-levels.ts';
import type { RegisteredLevels } from '#shared/levels/registered-levels.ts';
import { close, people, protocolFor, SessionMaker, StudyMaker, seal, sealedSecret } from './closed-study.ts';

export const registered = (change: Partial<RegisteredLevels> = {}): RegisteredLevels => ({
  handling: 'level-compensated',
  toleranceMilliDb: 100,
  frequenciesHz: [1000],
  ...change,
});

/**
 * A measurement at 1 kHz, three equal readings of each code.
 *
 * @param byCode left and right, in thousandths of a decibel, or in whole millivolts
 */
export function measured(
  byCode: Readonly<Record<string, readonly [number, number]>>,
  change: Partial<Pick<MeasuredLevels, 'check' | 'unit'>> = {},
): MeasuredLevels {
  const { check = 'before', unit = 'V' } = change;
  const scale = unit === 'V' ? perUnit('V') / 1000 : 1;
  return {
    check,
    unit,
    instrument: { name: 'Bench meter', bandwidthHz: 100_000, calibratedOn: '2026-03-01' },
    rows: Object.entries(byCode).flatMap(([code, [left, right]]) =>
      (['left', 'right'] as const).map((channel) => {
        const reading = Math.round((channel === 'left' ? left : right) * scale);
        return { code, channel, frequencyHz: 1000, readings: [reading, reading, reading] };
      }),
    ),
  };
}

/** What is measured before, at half time and after, in thousandths of a decibel of one code above the other. */
export type Course = { readonly before: number; readonly halfTime: number | null; readonly after: number | null };

/**
 * A closed study that registers levels: one session of five trials, measured by the code holder or by its proctor.
 *
 * @param by who measures
 */
export function studyWithLevels(levels: RegisteredLevels, course: Course, by = people.holder): ClosedStudy {
  const maker = new StudyMaker();
  const plain = protocolFor(maker.study, 1, 'abx', { sessions: 1, trials: 5, spares: 0 });
  const protocol = { ...plain, conduct: { ...plain.conduct, levels } };
  const codeKey = seal(maker, protocol, null);
  const session = new SessionMaker(maker, protocol, 1);
  const [, , ...others] = codeKey.rows;
  const record = (check: MeasuredLevels['check'], milliDb: number, first: MeasuredLevels | null) => {
    const quiet = Object.fromEntries(codeKey.rows.map(({ code }) => [code, [0, 0] as const]));
    const loud = Object.fromEntries(others.map(({ code }) => [code, [0, milliDb] as const]));
    const taken = measured({ ...quiet, ...loud }, { check, unit: 'dBV' });
    session.do({ kind: 'record-levels', by, measured: taken, ...judgeLevels(taken, first, levels) });
    return taken;
  };
  const first = record('before', course.before, null);
  session.seat(['L01'], sealedSecret(1));
  session.do({ kind: 'begin-familiarisation' });
  session.present();
  for (let trial = 1; trial <= 5; trial += 1) {
    if (trial === 4 && course.halfTime === null) session.do({ kind: 'skip-levels', reason: 'The meter is empty.' });
    else if (trial === 4) record('half-time', course.halfTime ?? 0, first);
    session.do({ kind: 'begin-trial' });
    session.present();
    session.answer('L01', 'A');
    session.lock();
  }
  session.do({ kind: 'finish' });
  if (course.after !== null) record('after', course.after, first);
  return close(maker, protocol, codeKey, { complete: true, reason: '' }, null);
}
