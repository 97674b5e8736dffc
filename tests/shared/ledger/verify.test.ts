import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalJson, type Json } from '#shared/ledger/canonical-json.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import type { CheckId } from '#shared/ledger/check-names.ts';
import {
  type PartName,
  type PublicationParts,
  partNames,
  publicationParts,
  publicationText,
  readPublication,
} from '#shared/ledger/publication-parts.ts';
import { checksOfFile, verifyStudy } from '#shared/ledger/verify.ts';
import { chainedAgain, closedStudy } from '../../support/closed-study.ts';

/** Which check answers for each part of the document. */
const checksFor: Record<PartName, readonly CheckId[]> = {
  record: ['record'],
  protocol: ['protocol'],
  // The code key is one of the two secrets, and is checked by itself.
  secrets: ['commitments', 'codeKey'],
  draws: ['draws'],
  answers: ['answers'],
  result: ['figures'],
};

function expectOne(failed: readonly CheckId[], among: readonly CheckId[], what: string): void {
  expect(failed, what).toHaveLength(1);
  expect(among, what).toContain(failed[0]);
}

const failuresIn = (text: string) => [...checksOfFile(text)].filter(({ outcome }) => outcome === 'fail');
const failing = (text: string) => failuresIn(text).map(({ id }) => id);

/** Where a part begins and ends in the document's text. */
function spanOf(text: string, parts: PublicationParts, part: PartName): { from: number; to: number } {
  const body = canonicalJson(parts[part] as Json);
  const from = text.lastIndexOf(`"${part}":${body}`) + part.length + 3;
  expect(text.slice(from, from + body.length)).toBe(body);
  return { from, to: from + body.length };
}

const studies = [
  { method: 'abx', listeners: 1 },
  { method: 'abx', listeners: 3 },
  { method: 'triangle', listeners: 2 },
  { method: 'same-different', listeners: 2 },
  { method: 'paired-preference', listeners: 1 },
  { method: 'paired-preference', listeners: 2 },
].map(({ method, listeners }) => {
  const parts = publicationParts(closedStudy(listeners, method));
  return { method, listeners, parts, text: publicationText(parts) };
});

describe.each(studies)('a published study by $method, $listeners at a time', ({ parts, text }) => {
  it('passes every check, from its file as from its parts [V1]', () => {
    expect([...checksOfFile(text)].map(({ outcome, id }) => `${id} ${outcome}`)).toEqual([
      'file pass',
      'record pass',
      'protocol pass',
      'commitments pass',
      'codeKey pass',
      'draws pass',
      'answers pass',
      'trials pass',
      'sessions pass',
      'listeners pass',
      'rules pass',
      'figures pass',
      'flow pass',
    ]);
    expect(verifyStudy(parts)).toEqual([...checksOfFile(text)].slice(1));
    expect(readPublication(text)).toEqual({ parts: JSON.parse(canonicalJson(parts as unknown as Json)) });
  });

  it.each(partNames)(
    'fails exactly one check for one altered byte in its %s, the right one [V2]',
    (part) => {
      const { from, to } = spanOf(text, parts, part);
      const printable = fc.integer({ min: 0x20, max: 0x7e }).map((code) => String.fromCharCode(code));
      fc.assert(
        fc.property(fc.integer({ min: from, max: to - 1 }), printable, (at, put) => {
          fc.pre(text[at] !== put);
          const altered = text.slice(0, at) + put + text.slice(at + 1);
          const isReadable = 'parts' in readPublication(altered);
          expectOne(failing(altered), isReadable ? checksFor[part] : ['file'], `${part} at ${at}`);
        }),
        { numRuns: 40, seed: 11 },
      );
    },
    120_000,
  );

  it.each(partNames)(
    'names the part that was altered in every single value of its %s [V2]',
    (part) => {
      const { from, to } = spanOf(text, parts, part);
      // One character of every text and every number in the part: a digit becomes another digit, a letter another letter.
      const tokens = [...text.slice(from, to).matchAll(/"(?:[^"\\]|\\.)*"(:?)|\d+/g)];
      const values = tokens.filter(([token, colon]) => colon !== ':' && token !== '""');
      expect(values.length).toBeGreaterThan(5);
      const step = Math.max(1, Math.floor(values.length / 30));
      for (const [index, value] of values.entries()) {
        if (index % step !== 0) continue;
        const [token] = value;
        const at = from + value.index + token.length - (token.endsWith('"') ? 2 : 1);
        const was = text.charAt(at);
        const put = /\d/.test(was) ? String((Number(was) + 1) % 10) : was === 'a' ? 'b' : 'a';
        const altered = text.slice(0, at) + put + text.slice(at + 1);
        expectOne(failing(altered), checksFor[part], `${part}, ${token}`);
      }
    },
    120_000,
  );

  it('says why nothing else can be checked where something it rests on has failed [V2]', () => {
    const { from } = spanOf(text, parts, 'record');
    const at = text.indexOf('"nonce":"', from) + 9;
    const altered = text.slice(0, at) + (text[at] === '0' ? '1' : '0') + text.slice(at + 1);
    const [file, record, ...rest] = [...checksOfFile(altered)];
    expect(file?.outcome).toBe('pass');
    expect(record?.reason).toBe('Entry 1: its content does not match its digest.');
    expect(new Set(rest.map(({ outcome, reason }) => `${outcome}: ${reason}`))).toEqual(
      new Set(['not checkable: It rests on “Record unbroken”, which did not pass.']),
    );
  });
});

describe('a record that was written anew, digests and all', () => {
  const study = closedStudy(2);
  const { entries } = study;
  const rewritten = (change: (entry: Entry) => Entry[]) => {
    const parts = publicationParts({ ...study, entries: chainedAgain(entries.flatMap(change)) });
    return verifyStudy(parts).filter(({ outcome }) => outcome === 'fail');
  };
  const where = (kind: string, session: number, trial?: number) => (entry: Entry) =>
    entry.kind === kind && entry.payload.session === session && (trial === undefined || entry.payload.trial === trial);

  it('is caught leaving out a trial that was locked [V3]', () => {
    const isTrial = ({ payload }: Entry) => payload.session === 1 && payload.trial === 3;
    const faults = rewritten((entry) => (isTrial(entry) ? [] : [entry]));
    expect(faults.map(({ id }) => id)).toContain('trials');
    expect(faults.find(({ id }) => id === 'trials')?.reason).toBe('Session 1: trial 3 is missing.');
  });

  it('is caught leaving out a session, whose number is missed [V3]', () => {
    const faults = rewritten((entry) => (entry.payload.session === 1 ? [] : [entry]));
    expect(faults.find(({ id }) => id === 'sessions')?.reason).toBe('Session 1 is missing.');
  });

  it('is caught leaving out a listener’s missing answer [V3]', () => {
    const isLock = where('trial-locked', 1, 4);
    const faults = rewritten((entry) => [
      isLock(entry) ? { ...entry, payload: { ...entry.payload, missing: [] } } : entry,
    ]);
    expect(faults.map(({ id }) => id)).toContain('trials');
  });

  it('is caught dropping the end of a session [V3]', () => {
    const faults = rewritten((entry) => (where('session-finished', 1)(entry) ? [] : [entry]));
    expect(faults).toMatchObject([{ id: 'trials', reason: 'Session 1 has no end on the record.' }]);
  });

  it('is caught changing who took part in the draw [V3]', () => {
    const faults = rewritten((entry) => [
      where('draw-fixed', 1)(entry) ? { ...entry, payload: { ...entry.payload, contributors: ['L01'] } } : entry,
    ]);
    expect(faults).toMatchObject([
      { id: 'draws', reason: 'Session 1: the draw was not fixed with the phones that the record lists.' },
    ]);
  });

  it('is caught changing a phone’s revealed number [V3]', () => {
    const faults = rewritten((entry) => [
      where('contribution-revealed', 1)(entry)
        ? { ...entry, payload: { ...entry.payload, value: 'ab'.repeat(32) } }
        : entry,
    ]);
    expect(faults).toMatchObject([
      { id: 'commitments', reason: 'Session 1, L01: the revealed number is not the one committed to.' },
    ]);
  });

  it('is caught with a protocol sealed after the fact [V3]', () => {
    const [sealing, ...rest] = entries;
    if (sealing === undefined) throw new Error('no sealing');
    const parts = publicationParts({ ...study, entries: chainedAgain([...rest, sealing]) });
    expect(verifyStudy(parts).find(({ id }) => id === 'protocol')?.reason).toBe(
      'The record does not begin with the sealing of a protocol.',
    );
  });

  it('is caught recording a better count than the answers give [V3]', () => {
    const better = (entry: Entry): Entry => {
      const result = entry.payload.result as { correct: number };
      return { ...entry, payload: { ...entry.payload, result: { ...result, correct: result.correct + 1 } } };
    };
    const faults = rewritten((entry) => [entry.kind === 'result-recorded' ? better(entry) : entry]);
    expect(faults).toMatchObject([
      { id: 'figures', reason: 'Recomputed, correct differs from the result on the record.' },
    ]);
  });
});
