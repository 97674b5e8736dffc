import { describe, expect, it } from 'vitest';
import type { Json } from '#shared/ledger/canonical-json.ts';
import { type Protocol, protocol } from '#shared/protocol/protocol.ts';
import { protocolDifferences } from '#shared/protocol/protocol-differences.ts';
import { closedStudy } from '../support/closed-study.ts';

const sealed = closedStudy(2).protocol;
const differences = (after: Protocol) => protocolDifferences(sealed, after, (person) => person);

describe('what an amendment changes', () => {
  it('is told line by line, old and new [J2]', () => {
    const { design, conduct } = sealed;
    const after = {
      ...sealed,
      version: 2,
      salt: 'f'.repeat(64),
      design: { ...design, trials: 12, attribute: 'bass' },
      conduct: { ...conduct, programme: [...conduct.programme, { title: 'Choir', start: '', lengthS: 9 }] },
    };
    expect(differences(after)).toEqual([
      { label: 'Attribute', before: '', after: 'bass' },
      { label: 'Trials per session', before: '5', after: '12' },
      { label: 'Excerpt 2', before: '', after: 'Choir, 9 s' },
    ]);
  });

  it('is nothing where only number and salt differ [J2]', () => {
    expect(differences({ ...sealed, version: 2, salt: 'f'.repeat(64) })).toEqual([]);
  });

  it('tells one cable, specimen or person from another of the same name, whatever else changes [J2]', () => {
    const [first, second] = sealed.cables;
    const design = { ...sealed.design, trials: 12, codeHolder: first.id };
    const other = {
      ...first,
      id: second.id,
      specimens: second.specimens.map((one, n) => ({ ...one, serial: first.specimens[n]?.serial ?? '' })),
    };
    const found = protocolDifferences(sealed, { ...sealed, cables: [other, second], design }, () => 'Ada');
    expect(found.map(({ label }) => label)).toEqual([
      'One cable',
      'One cable, specimens',
      'Trials per session',
      'Code holder',
    ]);
    expect(found.at(-1)).toEqual({ label: 'Code holder', before: 'Ada', after: 'Ada (another of the same name)' });
  });

  /** Every place of a value in it, as a path. */
  function placesIn(value: Json, path: readonly string[] = []): string[][] {
    if (typeof value !== 'object' || value === null) return [[...path]];
    return Object.entries(value).flatMap(([key, item]) => placesIn(item, [...path, key]));
  }

  function changed(value: Json, [key, ...rest]: readonly string[]): Json {
    if (key === undefined)
      return typeof value === 'number' ? value + 1 : typeof value === 'boolean' ? !value : `${value}x`;
    const copy = structuredClone(value) as { [name: string]: Json };
    copy[key] = changed(copy[key] ?? null, rest);
    return copy;
  }

  it('has a line for a change of any value that can change [J2]', () => {
    // What a study may leave out is changed too.
    const everything: Protocol = {
      ...sealed,
      treatment: { kind: 'cold', what: 'cooled slowly', by: 'a workshop', duration: '3 days', signal: 'none' },
      checks: { reference: 0, steps: [{ milliDb: 500, trials: 3, cable: sealed.cables[1] }], same: 2 },
    };
    const whole = everything as unknown as Json;
    const places = placesIn(whole).filter(([first]) => !['format', 'version', 'salt', 'study'].includes(first ?? ''));
    expect(places.length).toBeGreaterThan(40);
    const silent = places.filter((place) => {
      const after = changed(whole, place) as unknown as Protocol;
      const found = protocolDifferences(
        everything,
        place.join('.') === 'method' ? { ...everything, method: 'triangle' } : after,
        (person) => person,
      );
      return found.length === 0;
    });
    expect(silent).toEqual([]);
    expect(Object.keys(protocol.shape).sort()).toEqual(Object.keys(everything).sort());
  });
});
