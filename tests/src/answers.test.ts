import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { HeldAnswer } from '#shared/contracts/listener-live.ts';
import { answerLeaf } from '#shared/session/answer-leaf.ts';
import {
  acknowledged,
  answerTo,
  commandOf,
  isDifferent,
  isOwnLeaf,
  learnt,
  nextToSend,
  type OwnAnswer,
  refused,
  tapped,
  withAnswer,
} from '../../src/listener/answers.ts';

const place = { session: '7d3f0c7e-3f8e-4a55-9a54-0b2f5d1c9e01', seat: 'L01' };
const saltOf = (number: number) => number.toString(16).padStart(32, '0');
const tap = (choice: string, salt: number, trial = 4) => ({ trial, choice, confidence: null, salt: saltOf(salt) });

/** What a server that keeps to the rules holds once it has the answer. */
function heldBy(answer: OwnAnswer): HeldAnswer {
  const { trial, choice, confidence, revision, salt } = answer;
  const leaf = answerLeaf({ salt, trial, choice, confidence, ...place });
  return { trial, choice, confidence, revision, leaf, heldAt: 1_000 };
}

describe('an answer on the phone', () => {
  const first = tapped(null, tap('A', 1), place);

  it('is still on this phone until the server holds it [S13]', () => {
    expect(first.state).toBe('here');
    expect(acknowledged(first, heldBy(first))).toMatchObject({ state: 'held', heldAt: 1_000, choice: 'A' });
  });

  it('is sent as it was tapped, with its revision and salt [S7]', () => {
    expect(commandOf(first)).toEqual({ kind: 'answer', ...tap('A', 1), revision: 1 });
  });

  it('takes the next revision and a fresh salt when it is changed, and forgets neither leaf [S7]', () => {
    const second = tapped(first, tap('B', 2), place);
    expect(second).toMatchObject({ revision: 2, choice: 'B', salt: saltOf(2), state: 'here' });
    expect(second.leaves.map(({ revision }) => revision)).toEqual([1, 2]);
  });

  it('begins anew at revision 1 for another trial', () => {
    expect(tapped(first, tap('B', 2, 5), place)).toMatchObject({ trial: 5, revision: 1 });
  });

  it('stays here when only an older revision was acknowledged [S13]', () => {
    const second = tapped(first, tap('B', 2), place);
    expect(acknowledged(second, heldBy(first))).toMatchObject({ state: 'here', choice: 'B', revision: 2 });
  });

  it('gives way to a newer revision from another window of the seat', () => {
    const elsewhere = heldBy(tapped(tapped(null, tap('A', 7), place), tap('B', 8), place));
    expect(acknowledged(first, elsewhere)).toMatchObject({ state: 'held', choice: 'B', revision: 2, salt: '' });
  });

  it('is told apart from what the server holds under its very revision [S7]', () => {
    const other = { ...heldBy(first), choice: 'B', leaf: 'f'.repeat(64) };
    expect(isDifferent(first, other)).toBe(true);
    expect(isDifferent(first, heldBy(first))).toBe(false);
    expect(acknowledged(first, other)).toEqual(learnt(other));
  });

  it('says why it was not taken', () => {
    expect(refused(first, 'late', 'Trial 4 had locked.')).toMatchObject({ state: 'late', why: 'Trial 4 had locked.' });
  });
});

describe('the leaf that locks', () => {
  const first = tapped(null, tap('A', 1), place);
  const second = tapped(first, tap('B', 2), place);

  it('is own while either revision may be the one, and foreign otherwise [S7]', () => {
    expect(isOwnLeaf(second, heldBy(first).leaf)).toBe(true);
    expect(isOwnLeaf(second, heldBy(second).leaf)).toBe(true);
    expect(isOwnLeaf(second, 'f'.repeat(64))).toBe(false);
  });

  it('of a revision before the acknowledged one is foreign: the server has dropped it [S7]', () => {
    expect(isOwnLeaf(acknowledged(second, heldBy(second)), heldBy(first).leaf)).toBe(false);
  });

  it('cannot be told without the salt', () => {
    expect(isOwnLeaf(learnt(heldBy(first)), heldBy(first).leaf)).toBeNull();
    expect(isOwnLeaf(null, heldBy(first).leaf)).toBeNull();
  });
});

describe('the answers of a seat', () => {
  it('are kept one for each trial, in order, and the earliest undelivered goes first', () => {
    const fourth = tapped(null, tap('A', 1), place);
    const fifth = tapped(null, tap('B', 2, 5), place);
    const kept = withAnswer(withAnswer([fifth], fourth), acknowledged(fourth, heldBy(fourth)));
    expect(kept.map(({ trial, state }) => [trial, state])).toEqual([
      [4, 'held'],
      [5, 'here'],
    ]);
    expect(nextToSend(kept)?.trial).toBe(5);
    expect(answerTo(kept, 4)?.choice).toBe('A');
    expect(answerTo(kept, 9)).toBeNull();
  });

  it('end held as last tapped, whatever was lost or came twice on the way [S7] [S13]', () => {
    const events = fc.array(fc.oneof(fc.constantFrom('A', 'B'), fc.constantFrom('sent', 'lost', 'again')), {
      minLength: 1,
      maxLength: 30,
    });
    fc.assert(
      fc.property(events, (sequence) => {
        let own: OwnAnswer | null = null;
        let server: HeldAnswer | null = null;
        let last: string | null = null;
        const deliver = (isHeard: boolean) => {
          if (own === null) return;
          if (server === null || server.revision < own.revision) server = heldBy(own);
          if (isHeard) own = acknowledged(own, server);
        };
        for (const [index, event] of sequence.entries()) {
          if (event === 'A' || event === 'B') {
            own = tapped(own, tap(event, index + 1), place);
            last = event;
          } else if (event === 'again' && server !== null && own !== null) own = acknowledged(own, server);
          else deliver(event === 'sent');
        }
        deliver(true);
        const end = own as OwnAnswer | null;
        if (end === null) return last === null;
        return end.state === 'held' && end.choice === last && isOwnLeaf(end, heldBy(end).leaf) === true;
      }),
    );
  });
});
