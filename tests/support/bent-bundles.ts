import { zipSync } from 'fflate';
import { type BundleSource, bundleFiles, fileNames } from '#shared/bundle/bundle-files.ts';
import { writeZip } from '#shared/bundle/zip.ts';
import { canonicalJson, type Json } from '#shared/ledger/canonical-json.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import { nextEntry } from '#shared/ledger/chain.ts';
import type { CheckId } from '#shared/ledger/check-names.ts';
import { fileDigest, utf8ToBytes } from '#shared/ledger/digest.ts';
import { bundleSource, inclusionIn, publishedEntry, signedHeads, signingKey, stampedSource } from './bundle.ts';
import { chainedAgain, closedStudy } from './closed-study.ts';

// Ways to bend a published bundle, each with the line at which it must fail and what that line says. One table, for the
// code itself, for the command line and for a browser.

export type Whole = {
  readonly source: BundleSource;
  readonly files: ReadonlyMap<string, Uint8Array>;
  readonly zip: Uint8Array;
};

export type Bent = {
  readonly name: string;
  readonly line: CheckId;
  readonly says: RegExp;
  /** A bundle that was not bent but cannot show something is no failure. */
  readonly outcome?: 'not checkable';
  bend(whole: Whole): Uint8Array | Promise<Uint8Array>;
};

/** A bundle that nobody has bent: three listeners, two sessions, one abandoned; its tokens are an hour older than its trials. */
export async function wholeBundle(): Promise<Whole> {
  const source = await stampedSource(bundleSource(closedStudy(3, 'abx', Date.now() + 3_600_000)));
  const files = bundleFiles(source);
  return { source, files, zip: writeZip(files) };
}

const ladder = [
  { milliDb: 1000, trials: 2 },
  { milliDb: 500, trials: 2 },
];
let checked: Promise<Whole> | null = null;
/** The same with check trials among the others. */
function checkedBundle(): Promise<Whole> {
  checked ??= stampedSource(bundleSource(closedStudy(2, 'abx', Date.now() + 3_600_000, false, {}, ladder))).then(
    (source) => {
      const files = bundleFiles(source);
      return { source, files, zip: writeZip(files) };
    },
  );
  return checked;
}
/** A way to bend, of the bundle with check trials. */
const ofChecked = (bend: (whole: Whole) => Uint8Array | Promise<Uint8Array>) => async () => bend(await checkedBundle());

type Study = {
  record: Entry[];
  protocol: { [name: string]: Json } & { analysis: { [name: string]: Json } };
  secrets: {
    codeKey: { salt: string; rows: { code: string; cable: number }[] };
    draws: { secret: string; salt: string }[];
  };
  draws: { session: number; firstSide: number; truths: string[]; kinds?: string[] }[];
  answers: { session: string; trial: number; seat: string; choice: string; confidence: string | null; salt: string }[];
  result: { [name: string]: Json } & { correct: number; p: { value: string; numerator: string } };
  [name: string]: unknown;
};

const textOf = (bytes: Uint8Array | undefined) => new TextDecoder().decode(bytes);
const readStudy = (files: Whole['files']) => JSON.parse(textOf(files.get(fileNames.document))) as Study;
const canonical = (value: unknown) => utf8ToBytes(canonicalJson(value as Json));

/** Files replaced, added, or left out where null. */
function put(changes: Record<string, Uint8Array | string | null>) {
  return ({ files }: Whole): Uint8Array => {
    const changed = new Map(files);
    for (const [name, content] of Object.entries(changes))
      if (content === null) changed.delete(name);
      else changed.set(name, typeof content === 'string' ? utf8ToBytes(content) : content);
    return writeZip(changed);
  };
}

/** One file changed as text. */
const edit = (name: string, change: (text: string) => string) => (whole: Whole) => {
  const before = textOf(whole.files.get(name));
  const after = change(before);
  if (after === before) throw new Error(`nothing was bent in ${name}`);
  return put({ [name]: after })(whole);
};

/** The document changed and written canonically again; nothing else follows. */
const inDocument = (change: (study: Study) => void) => (whole: Whole) => {
  const study = readStudy(whole.files);
  change(study);
  return put({ [fileNames.document]: canonical(study) })(whole);
};

/** The document changed, and its publication written anew with the new digest; the signatures stay. */
const republished = (change: (study: Study) => void) => (whole: Whole) => {
  const study = readStudy(whole.files);
  change(study);
  const document = canonicalJson(study as unknown as Json);
  const later = [publishedEntry(study.record, document)];
  return put({ [fileNames.document]: document, [fileNames.later]: canonical(later) })(whole);
};

/** The record itself written anew, every digest made again, its publication too; the signatures stay. */
const rewritten = (change: (entries: Entry[], study: Study) => Entry[]) =>
  republished((study) => {
    study.record = chainedAgain(change(study.record, study));
  });

const dropped = (is: (entry: Entry) => boolean) => rewritten((entries) => entries.filter((entry) => !is(entry)));
const payloadOf = (entry: Entry) => entry.payload as Record<string, never>;
const changed = (is: (entry: Entry) => boolean, payload: (old: Entry['payload']) => Entry['payload']) =>
  rewritten((entries) => entries.map((entry) => (is(entry) ? { ...entry, payload: payload(entry.payload) } : entry)));

const isKind = (kind: string, session?: number, trial?: number) => (entry: Entry) =>
  entry.kind === kind &&
  (session === undefined || entry.payload.session === session) &&
  (trial === undefined || entry.payload.trial === trial);

const better = (old: Entry['payload'], change: (result: Study['result']) => object): Entry['payload'] =>
  ({ ...old, result: { ...(old.result as object), ...change(old.result as Study['result']) } }) as Entry['payload'];

const betterResult = (change: (result: Study['result']) => object) =>
  rewritten((entries, study) => {
    study.result = { ...study.result, ...change(study.result) } as Study['result'];
    return entries.map((entry) =>
      entry.kind === 'result-recorded' ? { ...entry, payload: better(entry.payload, change) } : entry,
    );
  });

/** heads.json changed. */
type Heads = {
  keys: { fingerprint: string; publicKey: string; createdAt: string; retiredAt: string | null }[];
  heads: { sequence: number; moment: string; at: string; signature: string; token: object | null }[];
};
const inHeads = (change: (heads: Heads) => void) => (whole: Whole) => {
  const heads = JSON.parse(textOf(whole.files.get(fileNames.heads))) as Heads;
  change(heads);
  return put({ [fileNames.heads]: canonical(heads) })(whole);
};

type Registry = {
  leaf: { digest: string; sealedAt: string };
  index: number;
  hashes: string[];
  head: { root: string; size: number };
};

/** registry.json changed. */
const inRegistry = (change: (file: Registry) => void) => (whole: Whole) => {
  const file = JSON.parse(textOf(whole.files.get('registry.json'))) as Registry;
  change(file);
  return put({ 'registry.json': canonical(file) })(whole);
};

const flipped = (hex: string) => `${hex.slice(0, -1)}${hex.endsWith('0') ? '1' : '0'}`;
const first = <T>(list: readonly T[]): T => {
  const [one] = list;
  if (one === undefined) throw new Error('nothing to bend');
  return one;
};

/** Bytes of an archive changed where a text stands in it. */
function patched(zip: Uint8Array, find: string, replace: string): Uint8Array {
  const bytes = zip.slice();
  const [from, to] = [utf8ToBytes(find), utf8ToBytes(replace)];
  for (let at = 0; at <= bytes.length - from.length; at += 1)
    if (from.every((byte, index) => bytes[at + index] === byte)) bytes.set(to, at);
  return bytes;
}

/** The length that the archive's directory states for a file. */
function restated(zip: Uint8Array, name: string, size: number): Uint8Array {
  const bytes = zip.slice();
  const view = new DataView(bytes.buffer);
  const wanted = utf8ToBytes(name);
  for (let at = 0; at < bytes.length - 46 - wanted.length; at += 1) {
    const isOf =
      view.getUint32(at, true) === 0x02014b50 && wanted.every((byte, index) => bytes[at + 46 + index] === byte);
    if (!isOf) continue;
    view.setUint32(at + 24, size, true);
    return bytes;
  }
  throw new Error(`the directory has no ${name}`);
}

/** Heads left out of heads.json, with their files. */
const withoutHeads = (isLeftOut: (moment: string) => boolean) => (whole: Whole) => {
  const gone = whole.source.heads.filter(({ signature }) => isLeftOut(signature.moment));
  const files = new Map(whole.files);
  for (const name of files.keys())
    if (gone.some(({ signature }) => name.startsWith(`heads/${signature.sequence}.`))) files.delete(name);
  return inHeads((heads) => {
    heads.heads = heads.heads.filter(({ moment }) => !isLeftOut(moment));
  })({ ...whole, files });
};

/** The bundle of another study, written as this one is. */
const other = () => bundleFiles(bundleSource(closedStudy(2, 'abx')));

const headOf = ({ source }: Whole, moment: string) =>
  first(source.heads.filter(({ signature }) => signature.moment === moment)).signature.sequence;

export const bentBundles: readonly Bent[] = [
  // The file itself
  { name: 'an empty file', line: 'file', says: /no archive/, bend: () => new Uint8Array() },
  {
    name: 'a text instead of an archive',
    line: 'file',
    says: /no archive/,
    bend: () => utf8ToBytes('PK and nothing more'),
  },
  {
    name: 'an archive cut in half',
    line: 'file',
    says: /no archive|missing/,
    bend: ({ zip }) => zip.slice(0, zip.length / 2),
  },
  {
    name: 'an archive without its last bytes',
    line: 'file',
    says: /no archive|missing/,
    bend: ({ zip }) => zip.slice(0, -4),
  },
  {
    name: 'a file that states two gigabytes',
    line: 'file',
    says: /unpack to more/,
    bend: ({ zip }) => restated(zip, 'study.json', 0x7fff_ffff),
  },
  {
    name: 'a file that states less than it holds',
    line: 'file',
    says: /./,
    bend: ({ zip }) => restated(zip, 'study.json', 3),
  },
  {
    name: 'more files than a bundle can hold',
    line: 'file',
    says: /more files/,
    bend: ({ files }) =>
      writeZip(
        new Map([
          ...files,
          ...Array.from({ length: 2000 }, (_, n): [string, Uint8Array] => [`f${n}`, new Uint8Array()]),
        ]),
      ),
  },
  { name: 'a path that climbs out', line: 'file', says: /leads elsewhere/, bend: put({ '../answers.csv': 'x' }) },
  {
    name: 'a path through a folder that climbs out',
    line: 'file',
    says: /leads elsewhere/,
    bend: put({ 'heads/../../x': 'x' }),
  },
  { name: 'a path from the root', line: 'file', says: /leads elsewhere/, bend: put({ '/etc/x': 'x' }) },
  { name: 'a path with backslashes', line: 'file', says: /leads elsewhere/, bend: put({ '..\\x': 'x' }) },
  {
    name: 'two files of one name',
    line: 'file',
    says: /twice/,
    bend: ({ files }) =>
      patched(zipSync(Object.fromEntries([...files, ['answerz.csv', utf8ToBytes('x')]])), 'answerz.csv', 'answers.csv'),
  },
  {
    name: 'a file that belongs to no bundle',
    line: 'file',
    says: /belongs to no bundle/,
    bend: put({ 'notes.txt': 'x' }),
  },
  { name: 'no document', line: 'file', says: /study\.json is missing/, bend: put({ 'study.json': null }) },
  { name: 'no later entries', line: 'file', says: /later\.json is missing/, bend: put({ 'later.json': null }) },
  { name: 'no heads', line: 'file', says: /heads\.json is missing/, bend: put({ 'heads.json': null }) },
  {
    name: 'no description of the tables',
    line: 'file',
    says: /datapackage\.json is missing/,
    bend: put({ 'datapackage.json': null }),
  },
  { name: 'no script', line: 'file', says: /recompute\.R is missing/, bend: put({ 'recompute.R': null }) },
  {
    name: 'a key of the document twice',
    line: 'file',
    says: /canonical/,
    bend: edit('study.json', (text) => text.replace('"version":1', '"version":1,"version":1')),
  },
  {
    name: 'a key of the heads twice',
    line: 'file',
    says: /canonical/,
    bend: edit('heads.json', (text) => text.replace('{"heads"', '{"heads":[],"heads"')),
  },
  {
    name: 'a whole number with a point',
    line: 'file',
    says: /canonical/,
    bend: edit('study.json', (text) => text.replace('"alpha":"0.05","', '"alpha":"0.05", "')),
  },
  {
    name: 'a number in another notation',
    line: 'file',
    says: /canonical/,
    bend: edit('study.json', (text) => text.replace('"sequence":1,', '"sequence":1e0,')),
  },
  {
    name: 'a space in the later entries',
    line: 'file',
    says: /canonical/,
    bend: edit('later.json', (text) => ` ${text}`),
  },
  {
    name: 'bytes that are no text',
    line: 'file',
    says: /UTF-8/,
    bend: put({ 'study.json': Uint8Array.of(0x7b, 0xff, 0xfe, 0x7d) }),
  },
  {
    name: 'a mark before the text',
    line: 'file',
    says: /UTF-8|JSON/,
    bend: edit('study.json', (text) => `\ufeff${text}`),
  },
  {
    name: 'a version from elsewhere',
    line: 'file',
    says: /version/,
    bend: inDocument((study) => {
      study.version = 2;
    }),
  },
  {
    name: 'a part that is not known',
    line: 'file',
    says: /not known/,
    bend: inDocument((study) => {
      study.extra = {};
    }),
  },
  {
    name: 'a part left out',
    line: 'file',
    says: /It has no draws/,
    bend: inDocument((study) => {
      delete (study as Record<string, unknown>).draws;
    }),
  },

  // The record
  {
    name: 'a forged time in an entry',
    line: 'record',
    says: /does not match its digest/,
    bend: inDocument(({ record }) => {
      record[9] = { ...first(record.slice(9)), at: '2020-01-01T00:00:00.000Z' };
    }),
  },
  {
    name: 'two entries in another order',
    line: 'record',
    says: /expected entry/,
    bend: inDocument(({ record }) => {
      record.splice(7, 2, ...record.slice(7, 9).reverse());
    }),
  },
  {
    name: 'an entry left out',
    line: 'record',
    says: /expected entry/,
    bend: inDocument(({ record }) => {
      record.splice(20, 1);
    }),
  },
  {
    name: 'an entry put in',
    line: 'record',
    says: /expected entry|link/,
    bend: inDocument(({ record }) => {
      record.splice(20, 0, first(record.slice(19)));
    }),
  },
  {
    name: 'the reason of a void changed',
    line: 'record',
    says: /does not match its digest/,
    bend: inDocument(({ record }) => {
      payloadOf(first(record.filter(isKind('trial-voided')))).reason = 'safety' as never;
    }),
  },
  {
    name: 'a random number of an entry changed',
    line: 'record',
    says: /does not match its digest/,
    bend: inDocument(({ record }) => {
      record[0] = { ...first(record), nonce: '0'.repeat(32) };
    }),
  },
  {
    name: 'an entry of another study',
    line: 'record',
    says: /another study/,
    bend: inDocument(({ record }) => {
      record[5] = { ...first(record.slice(5)), study: '00000000-0000-4000-8000-000000000000' };
    }),
  },
  {
    name: 'the last entries cut off',
    line: 'published',
    says: /does not link|expected entry/,
    bend: inDocument(({ record }) => {
      record.splice(-1, 1);
    }),
  },

  // Its publication
  {
    name: 'the document of another study',
    line: 'published',
    says: /expected entry|another study|link/,
    bend: ({ files }) => writeZip(new Map([...files, ['study.json', other().get('study.json') ?? new Uint8Array()]])),
  },
  {
    name: 'a document changed after its publication',
    line: 'published',
    says: /not the one whose digest/,
    bend: inDocument(({ draws }) => {
      first(draws).truths.push('A');
    }),
  },
  {
    name: 'no publication on the record',
    line: 'published',
    says: /No later entry/,
    bend: put({ 'later.json': '[]' }),
  },
  {
    name: 'something else after the document',
    line: 'published',
    says: /no publication: result-recorded/,
    bend: (whole) => {
      const last = first(whole.source.later);
      const more = nextEntry(last, { ...last, kind: 'result-recorded' });
      return put({ 'later.json': canonical([last, more]) })(whole);
    },
  },

  // Signatures
  {
    name: 'a session left out, the record written anew',
    line: 'signatures',
    says: /signed/,
    bend: dropped((entry) => entry.payload.session === 2),
  },
  {
    name: 'a void taken out, the record written anew',
    line: 'signatures',
    says: /signed/,
    bend: dropped(isKind('trial-voided')),
  },
  {
    name: 'a time forged, the record written anew',
    line: 'signatures',
    says: /signed is not the entry/,
    bend: rewritten((entries) =>
      entries.map((entry, index) => (index === 0 ? { ...entry, at: '2020-01-01T00:00:00.000Z' } : entry)),
    ),
  },
  {
    name: 'a signature with one bit changed',
    line: 'signatures',
    says: /does not match its key/,
    bend: inHeads(({ heads }) => {
      const one = first(heads);
      one.signature = flipped(one.signature);
    }),
  },
  {
    name: 'a signature left out',
    line: 'signatures',
    says: /signature is missing/,
    bend: withoutHeads((moment) => moment === 'closing'),
  },
  {
    name: 'no signature at all',
    line: 'signatures',
    says: /missing|No head/,
    bend: withoutHeads(() => true),
  },
  {
    name: 'a moment renamed',
    line: 'signatures',
    says: /does not/,
    bend: inHeads(({ heads }) => {
      first(heads).moment = 'closing';
    }),
  },
  {
    name: 'the time of a signature changed',
    line: 'signatures',
    says: /does not match its key|not in use/,
    bend: inHeads(({ heads }) => {
      first(heads).at = '2020-01-01T00:00:00.000Z';
    }),
  },
  {
    name: 'another key under the old fingerprint',
    line: 'signatures',
    says: /does not have the fingerprint/,
    bend: inHeads(({ keys }) => {
      first(keys).publicKey = signingKey('', 9).key.publicKey;
    }),
  },
  {
    name: 'a key that was not in use yet',
    line: 'signatures',
    says: /not in use|missing/,
    bend: inHeads(({ keys }) => {
      first(keys).createdAt = '2999-01-01T00:00:00.000Z';
    }),
  },
  {
    name: 'a key that had been retired',
    line: 'signatures',
    says: /not in use/,
    bend: inHeads(({ keys }) => {
      first(keys).retiredAt = '2020-01-01T00:00:00.000Z';
    }),
  },
  {
    name: 'no key',
    line: 'signatures',
    says: /no key|fingerprint/i,
    bend: (whole) =>
      inHeads((heads) => {
        heads.keys = [];
      })({ ...whole, files: new Map([...whole.files].filter(([name]) => !name.startsWith('keys/'))) }),
  },
  {
    name: 'a signature file that is not the one listed',
    line: 'signatures',
    says: /heads\/1\.sig is not what was signed/,
    bend: put({ 'heads/1.sig': new Uint8Array(64) }),
  },
  {
    name: 'a statement file that says something else',
    line: 'signatures',
    says: /heads\/1\.json is not what was signed/,
    bend: edit('heads/1.json', (text) => text.replace('sealing', 'closing')),
  },
  {
    name: 'a key file left out',
    line: 'signatures',
    says: /\.pem is missing/,
    bend: (whole) => put({ [`keys/${first(whole.source.keys).fingerprint}.pem`]: null })(whole),
  },

  // Protocol and time
  {
    name: 'another question in the protocol',
    line: 'protocol',
    says: /does not match the digest/,
    bend: republished(({ protocol }) => {
      protocol.question = 'Which is better?';
    }),
  },
  {
    name: 'another level in the protocol',
    line: 'protocol',
    says: /does not match the digest/,
    bend: republished(({ protocol }) => {
      protocol.analysis.alpha = '0.2';
    }),
  },
  {
    name: 'an exclusion put into the protocol',
    line: 'protocol',
    says: /protocol/i,
    bend: republished(({ protocol }) => {
      protocol.analysis.exclusions = 'those who failed' as Json;
    }),
  },
  {
    name: 'another salt of the protocol',
    line: 'protocol',
    says: /does not match the digest/,
    bend: republished(({ protocol }) => {
      protocol.salt = '0'.repeat(64);
    }),
  },
  {
    name: 'a protocol sealed at the end',
    line: 'protocol',
    says: /does not begin/,
    bend: rewritten(([sealing, ...rest]) => (sealing === undefined ? rest : [...rest, sealing])),
  },
  {
    name: 'everything signed anew with another key, under the old tokens',
    line: 'sealingTime',
    says: /something else/,
    bend: ({ source }) => {
      const key = signingKey(first(source.heads).signature.at, 9);
      const entries = [...(JSON.parse(source.document) as Study).record, ...source.later];
      const anew = signedHeads(entries, key);
      const heads = anew.map((signature, index) => ({ signature, token: source.heads[index]?.token ?? null }));
      return writeZip(bundleFiles({ ...source, keys: [key.key], heads }));
    },
  },
  {
    name: 'the token of another head',
    line: 'sealingTime',
    says: /something else/,
    bend: (whole) => put({ 'heads/1.tsr': whole.files.get(`heads/${headOf(whole, 'closing')}.tsr`) ?? null })(whole),
  },
  {
    name: 'a token with one bit of its signature changed',
    line: 'sealingTime',
    says: /signature does not hold/,
    bend: (whole) => {
      const token = (whole.files.get('heads/1.tsr') ?? new Uint8Array()).slice();
      token[token.length - 3] = (token[token.length - 3] ?? 0) ^ 1;
      return put({ 'heads/1.tsr': token })(whole);
    },
  },
  {
    name: 'a token that is none',
    line: 'sealingTime',
    says: /cannot be read/,
    bend: put({ 'heads/1.tsr': 'granted' }),
  },
  { name: 'a token left out', line: 'sealingTime', says: /missing/, bend: put({ 'heads/1.tsr': null }) },
  {
    name: 'certificates taken away from a token',
    line: 'sealingTime',
    says: /vouches for it/,
    bend: put({ 'heads/1.certificates.pem': '' }),
  },
  {
    name: 'a token of a draw that is for something else',
    line: 'drawTime',
    says: /something else/,
    bend: (whole) =>
      put({ [`heads/${headOf(whole, 'draw-fixed')}.tsr`]: whole.files.get('heads/1.tsr') ?? null })(whole),
  },

  // Secrets, draws, answers
  {
    name: 'two codes swapped in the key',
    line: 'codeKey',
    says: /not the one committed/,
    bend: republished(({ secrets }) => {
      const [a, , b] = secrets.codeKey.rows;
      if (a && b) [a.code, b.code] = [b.code, a.code];
    }),
  },
  {
    name: 'another salt of the code key',
    line: 'codeKey',
    says: /not the one committed/,
    bend: republished(({ secrets }) => {
      secrets.codeKey.salt = '0'.repeat(64);
    }),
  },
  {
    name: 'another secret of a draw',
    line: 'commitments',
    says: /Session 1: the revealed secret/,
    bend: republished(({ secrets }) => {
      first(secrets.draws).secret = '0'.repeat(64);
    }),
  },
  {
    name: 'another number of a phone',
    line: 'commitments',
    says: /revealed number/,
    bend: changed(isKind('contribution-revealed', 1), (old) => ({ ...old, value: '0'.repeat(64) })),
  },
  {
    name: 'a truth turned round',
    line: 'draws',
    says: /does not follow/,
    bend: republished(({ draws }) => {
      const one = first(draws);
      one.truths[0] = one.truths[0] === 'A' ? 'B' : 'A';
    }),
  },
  {
    name: 'the sides turned round',
    line: 'draws',
    says: /does not follow/,
    bend: republished(({ draws }) => {
      const one = first(draws);
      one.firstSide = 1 - one.firstSide;
    }),
  },
  {
    name: 'a draw left out',
    line: 'draws',
    says: /does not follow|listed draws/,
    bend: republished(({ draws }) => {
      draws.pop();
    }),
  },
  {
    name: 'other phones in a draw',
    line: 'draws',
    says: /not fixed with the phones/,
    bend: changed(isKind('draw-fixed', 1), (old) => ({ ...old, contributors: ['L01'] })),
  },
  {
    name: 'an answer turned round',
    line: 'answers',
    says: /does not match the record/,
    bend: republished(({ answers }) => {
      const one = first(answers);
      one.choice = one.choice === 'A' ? 'B' : 'A';
    }),
  },
  {
    name: 'a confidence put in',
    line: 'answers',
    says: /does not match the record/,
    bend: republished(({ answers }) => {
      first(answers).confidence = 'sure';
    }),
  },
  {
    name: 'an answer left out',
    line: 'answers',
    says: /does not match the record/,
    bend: republished(({ answers }) => {
      answers.pop();
    }),
  },
  {
    name: 'an answer put in',
    line: 'answers',
    says: /holds no such answer/,
    bend: republished(({ answers }) => {
      answers.push({ ...first(answers), trial: 2 });
    }),
  },
  {
    name: 'an answer twice',
    line: 'answers',
    says: /twice/,
    bend: republished(({ answers }) => {
      answers.push(first(answers));
    }),
  },
  {
    name: 'two salts swapped',
    line: 'answers',
    says: /does not match the record/,
    bend: republished(({ answers }) => {
      const [a, b] = answers;
      if (a && b) [a.salt, b.salt] = [b.salt, a.salt];
    }),
  },

  // What was counted
  {
    name: 'a locked trial left out, the record written anew',
    line: 'trials',
    says: /trial 3 is missing/,
    bend: dropped(({ payload }) => payload.session === 1 && payload.trial === 3),
  },
  {
    name: 'a missing answer hushed up',
    line: 'trials',
    says: /neither answered nor missing/,
    bend: changed(isKind('trial-locked', 1, 4), (old) => ({ ...old, missing: [] })),
  },
  {
    name: 'the end of a session left out',
    line: 'trials',
    says: /no end on the record/,
    bend: dropped(isKind('session-finished')),
  },
  {
    name: 'the first session left out',
    line: 'sessions',
    says: /Session 1 is missing/,
    bend: dropped(({ payload }) => payload.session === 1),
  },
  {
    name: 'missing answers counted another way',
    line: 'rules',
    says: /counts missing answers/,
    bend: betterResult(() => ({ missingAnswers: 'left out' })),
  },
  {
    name: 'a listener left out of the result',
    line: 'rules',
    says: /just the listeners/,
    bend: betterResult(({ byListener }) => ({ byListener: (byListener as Json[]).slice(1) })),
  },
  {
    name: 'another level in the result',
    line: 'rules',
    says: /another level/,
    bend: betterResult(() => ({ alpha: '0.2' })),
  },
  {
    name: 'a wrong p beside the record',
    line: 'figures',
    says: /not the one on the record/,
    bend: republished(({ result }) => {
      result.p.value = '0.00100000000000';
    }),
  },
  {
    name: 'a wrong p, the record written anew',
    line: 'figures',
    says: /p\/value differs/,
    bend: betterResult(({ p }) => ({ p: { ...p, value: '0.00100000000000' } })),
  },
  {
    name: 'a better count, the record written anew',
    line: 'figures',
    says: /correct differs/,
    bend: betterResult(({ correct }) => ({ correct: correct + 1 })),
  },
  {
    name: 'a limit moved in its third figure',
    line: 'figures',
    says: /differs/,
    bend: betterResult((result) => {
      const lower = result.lowerTail as string;
      return { lowerTail: lower.replace(/\d(?=\d{9}$)/, (digit) => String((Number(digit) + 1) % 10)) };
    }),
  },
  {
    name: 'fewer trials in the result',
    line: 'flow',
    says: /speaks of 7 trials/,
    bend: betterResult(() => ({ trials: 7 })),
  },
  { name: 'fewer answers in the result', line: 'flow', says: /answers/, bend: betterResult(() => ({ answers: 20 })) },
  {
    name: 'no missing answer in the result',
    line: 'flow',
    says: /0 missing answers/,
    bend: betterResult(() => ({ missing: 0 })),
  },

  // Tables
  {
    name: 'an answer in its table alone',
    line: 'tables',
    says: /answers\.csv differs from the record in line 2/,
    bend: edit('answers.csv', (text) =>
      text.replace(/(\r\n1,1,L01,)([AB])/, (_, before: string, was: string) => `${before}${was === 'A' ? 'B' : 'A'}`),
    ),
  },
  {
    name: 'a void counted in its table',
    line: 'tables',
    says: /trials\.csv/,
    bend: edit('trials.csv', (text) => text.replace(',void,', ',counted,')),
  },
  {
    name: 'a session left out of its table',
    line: 'tables',
    says: /sessions\.csv/,
    bend: edit('sessions.csv', (text) => text.replace(/\r\n2,[^\r]*/, '')),
  },
  {
    name: 'a listener put into the table',
    line: 'tables',
    says: /listeners\.csv/,
    bend: edit('listeners.csv', (text) => `${text}L99,1,1,0,true,false\r\n`),
  },
  {
    name: 'another p in the table of the result',
    line: 'tables',
    says: /result\.csv/,
    bend: edit('result.csv', (text) => text.replace(/p\/value,[^\r]*/, 'p/value,0.001')),
  },
  {
    name: 'other line ends',
    line: 'tables',
    says: /answers\.csv/,
    bend: edit('answers.csv', (text) => text.replaceAll('\r\n', '\n')),
  },
  {
    name: 'a bent table with a digest to match',
    line: 'tables',
    says: /datapackage\.json|trials\.csv/,
    bend: (whole) => {
      const was = whole.files.get('trials.csv') ?? new Uint8Array();
      const bent = utf8ToBytes(textOf(was).replace(',void,', ',counted,'));
      const description = textOf(whole.files.get('datapackage.json')).replace(fileDigest(was), fileDigest(bent));
      return put({ 'trials.csv': bent, 'datapackage.json': description })(whole);
    },
  },
  { name: 'a table left out', line: 'tables', says: /answers\.csv is missing/, bend: put({ 'answers.csv': null }) },
  {
    name: 'another protocol beside the document',
    line: 'tables',
    says: /protocol\.json/,
    bend: edit('protocol.json', (text) => text.replace('"alpha":"0.05"', '"alpha":"0.01"')),
  },
  {
    name: 'a better result beside the document',
    line: 'tables',
    says: /result\.json/,
    bend: edit('result.json', (text) => text.replace('"isSignificant":false', '"isSignificant":true')),
  },

  // Registry
  {
    name: 'an entry of the registry for another digest',
    line: 'registry',
    says: /another protocol/,
    bend: inRegistry((file) => {
      file.leaf.digest = '0'.repeat(64);
    }),
  },
  {
    name: 'another time of sealing in the registry',
    line: 'registry',
    says: /another time of sealing/,
    bend: inRegistry((file) => {
      file.leaf.sealedAt = '2020-01-01T00:00:00.000Z';
    }),
  },
  {
    name: 'another place in the registry',
    line: 'registry',
    says: /no proof leads/,
    bend: inRegistry((file) => {
      file.index = 0;
    }),
  },
  {
    name: 'a hash of the registry’s proof changed',
    line: 'registry',
    says: /no proof leads/,
    bend: inRegistry((file) => {
      file.hashes[0] = flipped(first(file.hashes));
    }),
  },
  {
    name: 'another root of the registry',
    line: 'registry',
    says: /no proof leads|signature does not match/,
    bend: inRegistry(({ head }) => {
      head.root = flipped(head.root);
    }),
  },
  {
    name: 'a larger registry than was signed',
    line: 'registry',
    says: /no proof leads|signature does not match/,
    bend: inRegistry(({ head }) => {
      head.size = 4;
    }),
  },
  {
    name: 'a registry’s head signed by a key of nobody',
    line: 'registry',
    says: /does not name as its own|signature does not match/,
    bend: (whole) => {
      const { record } = readStudy(whole.files);
      return put({ 'registry.json': canonical(inclusionIn(record, signingKey(first(record).at, 9))) })(whole);
    },
  },
  {
    name: 'no proof of the registry',
    line: 'registry',
    says: /no proof that the protocol/,
    outcome: 'not checkable',
    bend: put({ 'registry.json': 'null' }),
  },

  // Check trials
  {
    name: 'a failed check trial listed as a main one',
    line: 'draws',
    says: /does not follow from its secrets/,
    bend: ofChecked(
      republished(({ draws }) => {
        const kinds = first(draws).kinds ?? [];
        const [check, main] = [kinds.indexOf('step/0'), kinds.indexOf('main')];
        [kinds[check], kinds[main]] = ['main', 'step/0'];
      }),
    ),
  },
  {
    name: 'a failed check trial made a main one in the tables',
    line: 'tables',
    says: /trials\.csv differs from the record/,
    bend: ofChecked(edit('trials.csv', (text) => text.replace(/,check,1000/, ',main,'))),
  },
  {
    name: 'the size of a step changed in the protocol',
    line: 'protocol',
    says: /does not match the digest/,
    bend: ofChecked(
      republished(({ protocol }) => {
        const { steps } = protocol.checks as unknown as { steps: { milliDb: number }[] };
        first(steps).milliDb = 800;
      }),
    ),
  },
  {
    name: 'the size of a step changed in what it came to, the record written anew',
    line: 'figures',
    says: /checks\/steps\/1\/milliDb differs/,
    bend: ofChecked(
      changed(isKind('result-recorded'), (old) => {
        const checks = structuredClone(old.checks) as unknown as { steps: { milliDb: number }[] };
        const [, step] = checks.steps;
        if (step !== undefined) step.milliDb = 100;
        return { ...old, checks } as unknown as Entry['payload'];
      }),
    ),
  },
  {
    name: 'a step said to be heard, the record written anew',
    line: 'figures',
    says: /checks\/sensitiveTo differs|checks\/steps\/0\/isHeard differs/,
    bend: ofChecked(
      changed(isKind('result-recorded'), (old) => {
        const checks = structuredClone(old.checks) as unknown as { steps: { isHeard: boolean }[]; sensitiveTo: number };
        first(checks.steps).isHeard = true;
        checks.sensitiveTo = 1000;
        return { ...old, checks } as unknown as Entry['payload'];
      }),
    ),
  },

  // Not bent, and yet not everything can be shown
  {
    name: 'a token that has not come yet',
    line: 'sealingTime',
    says: /had not arrived/,
    outcome: 'not checkable',
    bend: ({ source }) =>
      writeZip(bundleFiles({ ...source, heads: source.heads.map(({ signature }) => ({ signature, token: null })) })),
  },
  {
    name: 'tokens that came after the trials',
    line: 'sealingTime',
    says: /too late/,
    outcome: 'not checkable',
    bend: async () =>
      writeZip(
        bundleFiles(await stampedSource(bundleSource(closedStudy(3, 'abx', Date.parse('2020-01-01T00:00:00Z'))))),
      ),
  },
];
