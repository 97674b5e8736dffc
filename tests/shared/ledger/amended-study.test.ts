import { describe, expect, it } from 'vitest';
import { bundleFiles } from '#shared/bundle/bundle-files.ts';
import { checksOfBundle } from '#shared/bundle/verify-bundle.ts';
import { writeZip } from '#shared/bundle/zip.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import { sealedVersions } from '#shared/ledger/protocol-versions.ts';
import {
  type ClosedStudy,
  publicationParts,
  publicationText,
  readPublication,
} from '#shared/ledger/publication-parts.ts';
import { type Check, checksOfFile, verifyStudy } from '#shared/ledger/verify.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { protocolDigest } from '#shared/protocol/protocol.ts';
import { blindingRung } from '#shared/session/blinding-rung.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import { bundleSource } from '../../support/bundle.ts';
import { chainedAgain, closedStudy } from '../../support/closed-study.ts';

describe('a study whose protocol was amended before data', () => {
  const study = closedStudy(2, 'abx', undefined, true);
  const parts = publicationParts(study);
  const text = publicationText(parts);
  const { entries } = study;
  const [first] = study.earlierProtocols ?? [];
  if (first === undefined) throw new Error('no earlier version');

  it('passes every check, with the versions before in its document [J6]', () => {
    expect([...checksOfFile(text)].filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(verifyStudy(parts).find(({ id }) => id === 'protocol')?.reason).toContain('entry 2, as version 2');
    const read = readPublication(text);
    expect('parts' in read && read.parts.earlierProtocols).toEqual([first]);
    expect(sealedVersions(entries)).toMatchObject([
      { sequence: 1, version: 1, digest: protocolDigest(first), reason: null },
      { sequence: 2, version: 2, digest: protocolDigest(study.protocol), reason: 'The amplifier was sold.' },
    ]);
  });

  it('fails at the protocol for one altered character in an earlier version [V2] [J6]', () => {
    const from = text.indexOf('"earlierProtocols":');
    const to = text.indexOf('"format":"fairlead-publication"');
    const values = [...text.slice(from, to).matchAll(/"(?:[^"\\]|\\.)*"(:?)|\d+/g)].filter(
      ([token, colon]) => colon !== ':' && token !== '""',
    );
    expect(values.length).toBeGreaterThan(20);
    for (const value of values) {
      const at = from + value.index + value[0].length - (value[0].endsWith('"') ? 2 : 1);
      const was = text.charAt(at);
      const put = /\d/.test(was) ? String((Number(was) + 1) % 10) : was === 'a' ? 'b' : 'a';
      const altered = text.slice(0, at) + put + text.slice(at + 1);
      const failed = [...checksOfFile(altered)].filter(({ outcome }) => outcome === 'fail');
      expect(
        failed.map(({ id }) => id),
        value[0],
      ).toEqual(['protocol']);
    }
  });

  it('makes a bundle that no check fails: the later version is signed, and is the one in force [J1] [J6]', async () => {
    const checks: Check[] = [];
    for await (const check of checksOfBundle(writeZip(bundleFiles(bundleSource(study))), null)) checks.push(check);
    expect(checks.filter(({ outcome }) => outcome === 'fail')).toEqual([]);
    // Without tokens their two lines stay open, and nothing else does.
    const open = checks.filter(({ outcome }) => outcome === 'not checkable');
    expect(open.map(({ id }) => id)).toEqual(['sealingTime', 'drawTime']);
    expect(open[0]?.reason).toContain('token for entry 2');
  });

  it('has no such part where nothing was amended [J6]', () => {
    expect(publicationParts(closedStudy(1))).not.toHaveProperty('earlierProtocols');
  });

  const failures = (change: (of: ClosedStudy) => ClosedStudy) =>
    verifyStudy(publicationParts(change(study)))
      .filter(({ outcome }) => outcome === 'fail')
      .map(({ id, reason }) => [id, reason]);
  const rewritten = (change: (entry: Entry) => Entry[]) => (of: ClosedStudy) => ({
    ...of,
    entries: chainedAgain(of.entries.flatMap(change)),
  });
  const isAmendment = ({ kind }: Entry) => kind === 'protocol-amended';
  const amendment = entries.find(isAmendment) as Entry;
  const payload = (change: object) =>
    rewritten((entry) => [isAmendment(entry) ? { ...entry, payload: { ...entry.payload, ...change } } : entry]);
  const movedBehind = (kind: string) => {
    const at = entries.find((entry) => entry.kind === kind)?.sequence;
    return rewritten((entry) => (isAmendment(entry) ? [] : entry.sequence === at ? [entry, amendment] : [entry]));
  };

  it.each<[string, (of: ClosedStudy) => ClosedStudy, string]>([
    [
      'an amendment after the first session opened',
      movedBehind('seating-opened'),
      'after the first session had opened',
    ],
    ['an amendment after the first trial', movedBehind('trial-locked'), 'after the first session had opened'],
    ['another digest', payload({ digest: '0'.repeat(64) }), 'does not match the digest'],
    ['a version left out', payload({ protocolVersion: 3 }), 'seals version 3 where 2 was due'],
    ['no amendment', rewritten((entry) => (isAmendment(entry) ? [] : [entry])), 'seals 1 versions'],
    [
      'a second sealing in its place',
      rewritten((entry) => [isAmendment(entry) ? { ...entry, kind: 'protocol-sealed' } : entry]),
      'seals the protocol a second time',
    ],
    ['no earlier version', ({ earlierProtocols: _, ...of }) => of, 'seals 2 versions of the protocol, and 1 are here'],
    ['another earlier version', (of) => ({ ...of, earlierProtocols: [{ ...first, question: 'Another?' }] }), 'digest'],
    [
      'the earlier version in force',
      (of) => ({ ...of, protocol: first, earlierProtocols: [study.protocol] }),
      'digest',
    ],
  ])('fails with %s [J6]', (_, change, reason) => {
    const found = failures(change);
    expect(found.map(([id]) => id)).toEqual(['protocol']);
    expect(found[0]?.[1]).toContain(reason);
  });

  it('fails where the codes were committed to again once a session had opened [J5]', () => {
    const committed = entries.find(({ kind }) => kind === 'code-key-committed') as Entry;
    const late = rewritten((entry) => (entry.kind === 'seating-opened' ? [entry, committed] : [entry]));
    expect(failures(late)).toEqual([['codeKey', 'The code key was committed to after somebody had sat down.']]);
  });

  const rungOf = (changed: readonly Entry[]) => {
    const method = methodOf('abx');
    return blindingRung(changed, sessionsInRecord(changed, method), method);
  };

  it('was not blind where it was amended after the first trial [J1]', () => {
    expect(rungOf(entries).name).not.toBe('open');
    expect(rungOf(movedBehind('trial-locked')(study).entries)).toEqual({
      name: 'open',
      why: 'The protocol was amended after the first trial.',
    });
  });

  it('does not count who held a code key that is void [J5]', () => {
    const proctor = entries.find(({ kind }) => kind === 'session-planned')?.payload.proctor ?? null;
    const committed = entries.find(({ kind }) => kind === 'code-key-committed') as Entry;
    const byProctor = { ...committed, payload: { ...committed.payload, by: proctor } };
    const voided = { ...committed, kind: 'code-key-voided', payload: { by: proctor } };
    const preceded = (...inserted: Entry[]) =>
      chainedAgain(entries.flatMap((entry) => (entry === committed ? [...inserted, entry] : [entry])));
    expect(rungOf(preceded(byProctor)).why).toContain('code holder also ran a session');
    expect(rungOf(preceded(byProctor, voided))).toEqual(rungOf(entries));
  });
});
