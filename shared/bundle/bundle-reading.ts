import { z } from 'zod';
import { inclusionFile } from '../contracts/registry.ts';
import { canonicalJson, type Json } from '../ledger/canonical-json.ts';
import type { Entry } from '../ledger/chain.ts';
import { fileDigest } from '../ledger/digest.ts';
import { moments } from '../ledger/moments.ts';
import { type PublicationParts, readPublication } from '../ledger/publication-parts.ts';
import { statementBytes, statementDigest } from '../ledger/signed-head.ts';
import { entryShape, once, read, StudyReading } from '../ledger/study-reading.ts';
import { type TokenVerdict, tokenVerdict, type WebCrypto } from '../ledger/token-signature.ts';
import { type BundledHead, fileNames, headFile, keyFile } from './bundle-files.ts';
import { utf8Text } from './bytes.ts';
import { readZip } from './zip.ts';

const hex = (bytes: number) => z.string().regex(new RegExp(`^[0-9a-f]{${bytes * 2}}$`));

const headsShape = z.strictObject({
  keys: z.array(
    z.strictObject({
      fingerprint: hex(32),
      publicKey: hex(32),
      createdAt: z.string(),
      retiredAt: z.string().nullable(),
    }),
  ),
  heads: z.array(
    z.strictObject({
      study: z.string(),
      sequence: z.int(),
      head: hex(32),
      moment: z.enum(moments),
      at: z.string(),
      key: hex(32),
      signature: hex(64),
      token: z.strictObject({ authority: z.string(), isLocal: z.boolean() }).nullable(),
    }),
  ),
});

export type Files = ReadonlyMap<string, Uint8Array>;

/** A file of an archive as text in UTF-8, or null where it is none. */
function textIn(files: Files, name: string): string | null {
  const bytes = files.get(name);
  return bytes === undefined ? null : utf8Text(bytes);
}

/** Canonical JSON under a name, or why it is none. */
function jsonIn(files: Files, name: string): { value: unknown } | { fault: string } {
  const text = textIn(files, name);
  if (text === null) return { fault: `${name} is missing, or no text in UTF-8.` };
  try {
    const value: unknown = JSON.parse(text);
    if (canonicalJson(value as Json) === text) return { value };
  } catch {
    return { fault: `${name} is not readable as JSON.` };
  }
  return { fault: `${name} is not written in canonical form (RFC 8785).` };
}

/** An unpacked bundle, each part read on first use. */
export class BundleReading {
  readonly files: Files;
  readonly study: StudyReading;
  /** What the time of each head's token comes to, by the number of its entry. */
  readonly verdicts: ReadonlyMap<number, TokenVerdict>;
  readonly #later: unknown;
  readonly #heads: unknown;
  readonly #registry: unknown;

  constructor(
    files: Files,
    parts: PublicationParts,
    { later, heads, registry }: { later: unknown; heads: unknown; registry: unknown },
    verdicts: BundleReading['verdicts'],
  ) {
    this.files = files;
    this.study = new StudyReading(parts);
    this.verdicts = verdicts;
    this.#later = later;
    this.#heads = heads;
    this.#registry = registry;
  }

  readonly later = once((): readonly Entry[] => read('later.json', z.array(entryShape), this.#later));
  readonly signed = once(() => read('heads.json', headsShape, this.#heads));
  readonly headsBySequence = once(() => new Map(this.signed().heads.map((head) => [head.sequence, head])));
  readonly inclusion = once(() => read('registry.json', inclusionFile.nullable(), this.#registry));
  /** The record with what came on it after the document. */
  readonly allEntries = once((): readonly Entry[] => [...this.study.entries(), ...this.later()]);
  readonly documentDigest = once(() => fileDigest(this.files.get(fileNames.document) ?? new Uint8Array()));
}

/** Every name that a bundle with these heads and keys may hold. */
function knownNames(heads: z.output<typeof headsShape>): Set<string> {
  const tables = [
    'sessions',
    'trials',
    'answers',
    'listeners',
    'requests',
    'result',
    'levels',
    'cues',
    'remarks',
    'checks',
  ].map((name) => `${name}.csv`);
  return new Set([
    ...Object.values(fileNames),
    ...tables,
    ...heads.keys.map(({ fingerprint }) => keyFile(fingerprint)),
    ...heads.heads.flatMap(({ sequence }) =>
      (['json', 'sig', 'tsr', 'certificates.pem'] as const).map((ending) => headFile(sequence, ending)),
    ),
  ]);
}

/**
 * Opens a bundle: unpacks it, reads what is JSON in canonical form, and asks of every token what it shows.
 *
 * @param bytes  the file
 * @param crypto `globalThis.crypto`, or null where there is none
 * @returns the bundle, or in a sentence why it is none
 */
export async function openBundle(
  bytes: Uint8Array,
  crypto: WebCrypto | null,
): Promise<{ bundle: BundleReading } | { fault: string }> {
  const unpacked = readZip(bytes);
  if ('fault' in unpacked) return unpacked;
  const { files } = unpacked;
  const text = textIn(files, fileNames.document);
  if (text === null) return { fault: `${fileNames.document} is missing, or no text in UTF-8.` };
  const document = readPublication(text);
  if ('fault' in document) return { fault: `${fileNames.document}: ${document.fault}` };
  const later = jsonIn(files, fileNames.later);
  if ('fault' in later) return later;
  const heads = jsonIn(files, fileNames.heads);
  if ('fault' in heads) return heads;
  const registry = jsonIn(files, fileNames.registry);
  if ('fault' in registry) return registry;
  const signed = headsShape.safeParse(heads.value);
  const absent = Object.values(fileNames).find((name) => !files.has(name));
  if (absent !== undefined) return { fault: `${absent} is missing.` };
  if (signed.success) {
    const known = knownNames(signed.data);
    const stray = [...files.keys()].find((name) => !known.has(name));
    if (stray !== undefined) return { fault: `It holds ${stray}, which belongs to no bundle.` };
  }
  const verdicts = signed.success
    ? await verdictsOf(files, signed.data.heads, crypto)
    : new Map<number, TokenVerdict>();
  const read = { later: later.value, heads: heads.value, registry: registry.value };
  return { bundle: new BundleReading(files, document.parts, read, verdicts) };
}

async function verdictsOf(
  files: Files,
  heads: readonly (BundledHead['signature'] & { token: object | null })[],
  crypto: WebCrypto | null,
): Promise<Map<number, TokenVerdict>> {
  const verdicts = new Map<number, TokenVerdict>();
  for (const head of heads) {
    if (head.token === null) continue;
    const reply = files.get(headFile(head.sequence, 'tsr'));
    const certificates = textIn(files, headFile(head.sequence, 'certificates.pem'));
    verdicts.set(
      head.sequence,
      reply === undefined || certificates === null
        ? { state: 'fault', why: 'its token or certificates are missing' }
        : await tokenVerdict(
            crypto,
            { bytes: statementBytes(head), digest: statementDigest(head) },
            reply,
            certificates,
          ),
    );
  }
  return verdicts;
}
