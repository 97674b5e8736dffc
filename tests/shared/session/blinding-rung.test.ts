import { describe, expect, it } from 'vitest';
import type { Json } from '#shared/ledger/canonical-json.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { blindingRung } from '#shared/session/blinding-rung.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import { chainedAgain, closedStudy, people } from '../../support/closed-study.ts';

const { entries } = closedStudy(2);
const states = sessionsInRecord(entries, methodOf('abx'));
const rungOf = (record: readonly Entry[]) => blindingRung(chainedAgain(record), states, methodOf('abx'));

const closedAs = (change: Record<string, Json>) =>
  entries.map((entry) =>
    entry.kind === 'study-closed' ? { ...entry, payload: { ...entry.payload, ...change } } : entry,
  );

const openedBy = (by: string): Entry[] => {
  const [sealing, committing, ...rest] = entries as [Entry, Entry, ...Entry[]];
  return [sealing, committing, { ...committing, kind: 'code-key-opened', payload: { by, purpose: 'labels' } }, ...rest];
};

/** The record with the first entry of a kind moved to just behind the last of another. */
function movedBehind(kind: string, after: string): Entry[] {
  const moved = entries.find((entry) => entry.kind === kind);
  const rest = entries.filter((entry) => entry !== moved);
  const at = rest.findLastIndex((entry) => entry.kind === after);
  return moved === undefined ? [] : [...rest.slice(0, at + 1), moved, ...rest.slice(at + 1)];
}

describe('the blinding rung', () => {
  it('is double-blind to the cable where nobody who ran a session could know the codes [V11]', () => {
    expect(rungOf(entries)).toEqual({
      name: 'double-blind to the cable',
      isWitnessed: false,
      why: 'The proctor never saw code key or cable pages. Whoever fits X could still see whether its code is that of A. No observer was recorded.',
    });
  });

  it.each([
    ['the code holder ran a session', closedAs({ codeHolder: people.proctor })],
    ['a proctor opened the codes', openedBy(people.proctor)],
    ['a proctor could see the cables’ pages', closedAs({ managers: [people.manager, people.proctor] })],
    ['a proctor owns the organisation', closedAs({ owners: [people.proctor] })],
    ['the code holder managed the study', closedAs({ codeHolder: people.manager })],
    ['the code holder owns the organisation', closedAs({ owners: [people.holder] })],
    ['an owner opened the codes', openedBy(people.owner)],
  ])('is listener-blind where %s [V11]', (_what, record) => {
    expect(rungOf(record).name).toBe('listener-blind');
  });

  it.each([
    [
      'the protocol was sealed after the first trial',
      movedBehind('protocol-sealed', 'trial-locked'),
      /protocol was not sealed/,
    ],
    [
      'the code key was committed to after it',
      movedBehind('code-key-committed', 'trial-locked'),
      /code key was not committed/,
    ],
    [
      'a trial opened before its draw was fixed',
      movedBehind('draw-fixed', 'trial-locked'),
      /Session 1 had a trial before/,
    ],
    [
      'the secrets were revealed too early',
      movedBehind('key-revealed', 'draw-fixed'),
      /revealed before the last trial/,
    ],
  ])('is open where %s [V11]', (_what, record, why) => {
    expect(rungOf(record)).toMatchObject({ name: 'open', why: expect.stringMatching(why) });
  });
});
