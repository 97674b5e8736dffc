import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalJson, type Json } from '#shared/ledger/canonical-json.ts';
import { chainFault, type Entry, nextEntry } from '#shared/ledger/chain.ts';

function chainOf(payloads: readonly { readonly [key: string]: Json }[]): Entry[] {
  const entries: Entry[] = [];
  for (const [index, payload] of payloads.entries())
    entries.push(
      nextEntry(entries.at(-1) ?? null, {
        study: 'a-study',
        at: '2026-12-05T18:00:00.000Z',
        kind: 'note',
        version: 1,
        payload,
        nonce: String(index).padStart(32, '0'),
      }),
    );
  return entries;
}

describe('canonical JSON', () => {
  // RFC 8785, section 3.2.3: property names are sorted by their UTF-16 code units.
  it('sorts names by UTF-16 code units, as in the RFC’s own example [L1]', () => {
    const value = {
      '\u20ac': 'Euro Sign',
      '\r': 'Carriage Return',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '1': 'One',
      '\ud83d\ude00': 'Emoji: Grinning Face',
      '\u0080': 'Control',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
    };
    const names = [...canonicalJson(value).matchAll(/:"([^"]+)"/g)].map(([, name]) => name);
    expect(names).toEqual([
      'Carriage Return',
      'One',
      'Control',
      'Latin Small Letter O With Diaeresis',
      'Euro Sign',
      'Emoji: Grinning Face',
      'Hebrew Letter Dalet With Dagesh',
    ]);
  });

  it.each([
    ['a fraction', { a: 0.5 }],
    ['an unsafe integer', { a: 2 ** 53 }],
    ['minus zero', { a: -0 }],
    ['nothing', { a: undefined }],
    ['a date', { a: new Date(0) }],
    ['a broken character', { a: '\ud800' }],
  ])('refuses %s [L1]', (_what, value) => {
    expect(() => canonicalJson(value as unknown as Json)).toThrow(RangeError);
  });
});

describe('the chain', () => {
  it('holds whatever is appended [L2]', () => {
    fc.assert(
      fc.property(
        fc.array(fc.record({ text: fc.string({ unit: 'grapheme' }), count: fc.maxSafeInteger() }), { maxLength: 12 }),
        (payloads) => {
          const safe = payloads.filter(({ count }) => !Object.is(count, -0));
          expect(chainFault(chainOf(safe))).toBeNull();
        },
      ),
    );
  });

  const entries = chainOf([{ n: 1 }, { n: 2 }, { n: 3 }, { n: 4 }]);
  const altered = (index: number, change: Partial<Entry>) =>
    entries.map((entry, at) => (at === index ? { ...entry, ...change } : entry));

  it.each([
    ['a payload', altered(1, { payload: { n: 9 } }), 2],
    ['a time', altered(2, { at: '2026-12-05T18:00:00.001Z' }), 3],
    ['a digest', altered(0, { digest: 'f'.repeat(64) }), 1],
    ['an entry left out', entries.filter((_, index) => index !== 1), 2],
    ['two entries swapped', [entries[0], entries[2], entries[1], entries[3]] as Entry[], 2],
  ])('finds %s, and where [L2]', (_what, chain, sequence) => {
    expect(chainFault(chain)?.sequence).toBe(sequence);
  });
});
