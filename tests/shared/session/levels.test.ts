import { describe, expect, it } from 'vitest';
import { tablesOf, tableText } from '#shared/bundle/tables.ts';
import { levelClaim, levelModifiers } from '#shared/findings/level-sentences.ts';
import { type ClosedStudy, publicationParts } from '#shared/ledger/publication-parts.ts';
import { StudyReading } from '#shared/ledger/study-reading.ts';
import { verifyStudy } from '#shared/ledger/verify.ts';
import { levelsFound, mayExplain } from '#shared/levels/levels-found.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { blindingRung } from '#shared/session/blinding-rung.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import { revealedKey } from '#shared/session/revealed-key.ts';
import { chainedAgain, people } from '../../support/closed-study.ts';
import { registered, studyWithLevels } from '../../support/levels.ts';

const supplied = registered({ handling: 'as-supplied' });
const foundIn = ({ entries, protocol }: ClosedStudy) => {
  const key = revealedKey.parse(entries.find(({ kind }) => kind === 'key-revealed')?.payload);
  return levelsFound(entries, key.codeKey.rows, protocol.conduct.levels ?? supplied, [1]);
};
const deviations = ({ entries }: ClosedStudy) =>
  entries.filter(({ kind }) => kind === 'deviation-recorded').map(({ payload }) => String(payload.text));
const course = (before: number, halfTime: number | null = before, after: number | null = before) => ({
  before,
  halfTime,
  after,
});

describe('the gate', () => {
  it('keeps a level-compensated session from starting beyond 0.2 dB, and an as-supplied one not [S64]', () => {
    expect(() => studyWithLevels(registered(), course(201))).toThrow(/out by more than 0.2 dB/);
    expect(deviations(studyWithLevels(registered(), course(200)))).toHaveLength(3);
    expect(deviations(studyWithLevels(supplied, course(900)))).toEqual([]);
  });

  it('puts a poor match and a move on the record as deviations, without a figure [S65]', () => {
    const moved = deviations(studyWithLevels(registered(), course(90, 90, 195)));
    expect(moved).toEqual([
      'Levels at the load after the session were out of the registered tolerance.',
      'Levels at the load after the session had drifted since the start by more than 0.1 dB.',
    ]);
    expect(deviations(studyWithLevels(supplied, course(0, 101)))).toHaveLength(1);
  });

  it('goes on at half time without a measurement for a reason, which is a deviation [S68]', () => {
    expect(deviations(studyWithLevels(supplied, course(0, null)))).toEqual([
      'Levels at the load at half time were not measured: The meter is empty.',
    ]);
  });
});

describe('what levels mean for a closed study', () => {
  it('caps it at listener-blind where a proctor measured [S67]', () => {
    const rungOf = ({ entries }: ClosedStudy) =>
      blindingRung(entries, sessionsInRecord(entries, methodOf('abx')), methodOf('abx'));
    expect(rungOf(studyWithLevels(supplied, course(0))).name).toBe('double-blind to the cable');
    expect(rungOf(studyWithLevels(supplied, course(0), people.proctor))).toEqual({
      name: 'listener-blind',
      why: 'A proctor measured the levels and saw them by code.',
    });
  });

  it.each([
    [registered(), course(40), ['Levels at the load were matched within 0.04 dB.']],
    [registered(), course(100), ['Levels at the load were matched within 0.10 dB.']],
    [
      registered(),
      course(150),
      ['The cables differed by 0.15 dB in level at the load; loudness may explain the result.'],
    ],
    [
      registered({ toleranceMilliDb: 50 }),
      course(80),
      ['The cables differed by 0.08 dB in level at the load; loudness may explain the result.'],
    ],
    [supplied, course(100), ['Levels at the load, with the cables as supplied, were within 0.10 dB.']],
    [
      supplied,
      course(310),
      ['The cables, as supplied, differed by 0.31 dB in level at the load; loudness may explain the result.'],
    ],
    [
      registered(),
      course(-60, -60, 60),
      ['Levels at the load were matched within 0.06 dB.', 'Level moved by 0.12 dB over session 1, more than 0.1 dB.'],
    ],
  ])('is said by its finding [S69]', (levels, of, words) => {
    const found = foundIn(studyWithLevels(levels, of));
    expect(levelModifiers(found, 'a difference')).toEqual(words);
    expect(levelClaim(found, 'the difference')).toBe(words[0]);
    expect(mayExplain(found)).toBe(words[0]?.includes('loudness') === true);
  });

  it('names a session that was not measured, and a study that registers no levels [S69]', () => {
    const study = studyWithLevels(supplied, course(0));
    const key = revealedKey.parse(study.entries.find(({ kind }) => kind === 'key-revealed')?.payload);
    expect(levelModifiers(levelsFound(study.entries, key.codeKey.rows, supplied, [1, 2]), 'a difference')).toEqual([
      'Level at the load was not measured in session 2; loudness may explain a difference.',
    ]);
    expect(levelModifiers(undefined, 'a preference')).toEqual([
      'Level at the load was not recorded in Fairlead; loudness may explain a preference.',
    ]);
    expect(levelClaim(undefined, 'the preference')).toBe(
      'Level at the load was not recorded; loudness may explain the preference.',
    );
  });

  it('verifies, and is judged anew by whoever verifies [S70]', () => {
    const study = studyWithLevels(registered(), course(150));
    expect(verifyStudy(publicationParts(study)).filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    const better = study.entries.map((entry) =>
      entry.kind === 'levels-measured' ? { ...entry, payload: { ...entry.payload, grade: 'target' } } : entry,
    );
    const failed = verifyStudy(publicationParts({ ...study, entries: chainedAgain(better) })).filter(
      ({ outcome }) => outcome === 'fail',
    );
    expect(failed.map(({ id }) => id)).toEqual(['rules']);
    expect(failed[0]?.reason).toMatch(/judges its levels otherwise/);
  });

  it('comes as a table of every reading, made from the record [S70]', () => {
    const study = studyWithLevels(registered(), course(50));
    const levels = tablesOf(new StudyReading(publicationParts(study))).find(({ name }) => name === 'levels');
    if (levels === undefined) throw new Error('no table of levels');
    const lines = tableText(levels).split('\r\n');
    expect(lines[0]).toBe(
      'session,check,measured,code,cable,channel,frequency_hz,unit,reading_1,reading_2,reading_3,level_mdb,instrument,bandwidth_hz,calibrated_on',
    );
    expect(lines).toHaveLength(1 + 3 * 8 + 1);
    expect(lines[1]).toMatch(/^1,before,.*Z,317,Northern run,left,1000,dBV,0,0,0,0,Bench meter,100000,2026-03-01$/);
  });
});
