import { describe, expect, it } from 'vitest';
import type { ListenerView } from '#shared/contracts/listener-live.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import { findReceipts, readReceipts } from '#shared/ledger/receipts.ts';
import type { PayloadOf } from '#shared/session/events.ts';
import { receiptsText } from '../../../src/listener/receipts-text.ts';
import { closedStudy } from '../../support/closed-study.ts';

const { entries } = closedStudy(3);
const locks = entries.filter(({ kind, payload }) => kind === 'trial-locked' && payload.session === 1);
const kept = locks.flatMap(({ payload, sequence, digest }) => {
  const { trial, leaves } = payload as unknown as PayloadOf<'trial-locked'>;
  return leaves
    .filter(({ seat }) => seat === 'L02')
    .map(({ leaf }) => ({ trial, leaf, sequence, digest, isOwn: true as const }));
});
const view = { title: 'Study Plover, session 9, seat L77', session: 1, seat: 'L02' } as ListenerView;
const disputed = [{ trial: 3, choice: 'A', confidence: null, revision: 2, salt: 'ab'.repeat(16) }];
const text = receiptsText(view, { receipts: kept, disputed: disputed as never });
const found = (words: string, record: readonly Entry[] = entries) => findReceipts(readReceipts(words), record);
const swap = (from: string, to: string) => text.replace(from, to);

describe('receipts of a phone [V14]', () => {
  it('are read from the text that the phone copies, whatever its title says', () => {
    expect(readReceipts(text)).toEqual({
      seat: { session: 1, label: 'L02' },
      receipts: kept.map(({ isOwn: _, ...receipt }) => receipt),
      notHeld: 1,
    });
    expect(kept).toHaveLength(5);
  });

  it('are read the same when mail has changed lines, spaces and case', () => {
    const mangled = text
      .replaceAll('\n', '\r\n   ')
      .replaceAll(' leaf ', ' Leaf\n')
      .replace(kept[0]?.leaf ?? '', (leaf) => leaf.toUpperCase());
    expect(readReceipts(mangled)).toEqual(readReceipts(text));
  });

  it('are all found on the record that locked them', () => {
    expect(found(text).map(({ trial, isOnRecord }) => [trial, isOnRecord])).toEqual(
      kept.map(({ trial }) => [trial, true]),
    );
    expect(found(text)[0]?.words).toBe(`locked by entry ${kept[0]?.sequence} of this record, with this leaf.`);
  });

  const [first, second] = kept;
  const other = locks[0]?.payload.leaves as unknown as { seat: string; leaf: string }[];
  it.each([
    ['an entry beyond its end', swap(`entry ${first?.sequence}`, 'entry 99999'), 'this record has no entry 99999.'],
    ['another digest', swap(first?.digest ?? '', '0'.repeat(64)), 'its digest differs'],
    [
      'an entry that locks nothing',
      swap(`entry ${first?.sequence} ${first?.digest}`, `entry 1 ${entries[0]?.digest}`),
      'entry 1 locks no trial.',
    ],
    [
      'another trial',
      swap(`${first?.sequence} ${first?.digest}`, `${second?.sequence} ${second?.digest}`),
      'locks another trial: session 1, trial 3.',
    ],
    [
      'another session',
      text.replace('session 1, seat L02\n', 'session 2, seat L02\n'),
      'locks another trial: session 1, trial 1.',
    ],
    ['another leaf', swap(first?.leaf ?? '', 'a'.repeat(64)), 'does not hold this leaf'],
    [
      'the leaf of somebody else',
      swap(first?.leaf ?? '', other.find(({ seat }) => seat === 'L01')?.leaf ?? ''),
      'holds this leaf for L01, not for L02.',
    ],
  ])('say why one is not on it: %s', (_what, words, says) => {
    const [one, ...others] = found(words);
    expect(one?.isOnRecord).toBe(false);
    expect(one?.words).toContain(says);
    if (_what !== 'another session') expect(others.every(({ isOnRecord }) => isOnRecord)).toBe(true);
  });

  it('are not on the record of another study, nor on none', () => {
    const elsewhere = closedStudy(3, 'abx', Date.parse('2026-01-05T18:00:00.000Z')).entries;
    expect(found(text, elsewhere).some(({ isOnRecord }) => isOnRecord)).toBe(false);
    expect(found(text, []).some(({ isOnRecord }) => isOnRecord)).toBe(false);
  });

  it('are none in a text that holds none', () => {
    expect(readReceipts('trial 1 was fine, leaf through it')).toEqual({ seat: null, receipts: [], notHeld: 0 });
  });
});
