import type { InclusionFile } from '../contracts/registry.ts';
import { canonicalJson, type Json } from '../ledger/canonical-json.ts';
import type { Entry } from '../ledger/chain.ts';
import { hexToBytes, utf8ToBytes } from '../ledger/digest.ts';
import { readPublication } from '../ledger/publication-parts.ts';
import { type HeadSignature, type PublicKey, publicKeyPem, statementBytes } from '../ledger/signed-head.ts';
import { StudyReading } from '../ledger/study-reading.ts';
import { dataPackageText } from './data-package.ts';
import { tablesOf, tableText } from './tables.ts';

export type BundledToken = {
  readonly authority: string;
  readonly isLocal: boolean;
  /** The authority's reply in DER. */
  readonly reply: Uint8Array;
  /** PEM. */
  readonly certificates: string;
};

export type BundledHead = { readonly signature: HeadSignature; readonly token: BundledToken | null };

/** All that a bundle is made of. */
export type BundleSource = {
  /** The frozen document of the publication. */
  readonly document: string;
  /** What came on the record after the document: that it was published, and perhaps withdrawn. */
  readonly later: readonly Entry[];
  /** Every key of the organisation, retired ones too. */
  readonly keys: readonly PublicKey[];
  readonly heads: readonly BundledHead[];
  /** That the sealed protocol is in the organisation's registry; null where it has none. */
  readonly registry: InclusionFile | null;
  /** Words for people, and the script that recomputes the figures in R; no check rests on them. */
  readonly guide: string;
  readonly recompute: string;
};

/** Files of fixed names; heads and keys lie in folders beside them. */
export const fileNames = {
  document: 'study.json',
  later: 'later.json',
  heads: 'heads.json',
  registry: 'registry.json',
  protocol: 'protocol.json',
  result: 'result.json',
  dataPackage: 'datapackage.json',
  guide: 'GUIDE.txt',
  recompute: 'recompute.R',
} as const;

export const headFile = (sequence: number, ending: 'json' | 'sig' | 'tsr' | 'certificates.pem') =>
  `heads/${sequence}.${ending}`;
export const keyFile = (fingerprint: string) => `keys/${fingerprint}.pem`;

const text = (value: unknown) => utf8ToBytes(canonicalJson(value as Json));

/** heads.json: every key and every signed head, with who stamped the time on it. */
export function headsText({ keys, heads }: Pick<BundleSource, 'keys' | 'heads'>): Uint8Array {
  return text({
    keys: keys.map(({ fingerprint, publicKey, createdAt, retiredAt }) => ({
      fingerprint,
      publicKey,
      createdAt,
      retiredAt,
    })),
    heads: heads.map(({ signature: { study, sequence, head, moment, at, key, signature }, token }) => ({
      ...{ study, sequence, head, moment, at, key, signature },
      token: token === null ? null : { authority: token.authority, isLocal: token.isLocal },
    })),
  });
}

/** The files beside heads.json that let other programs check a head: what was signed, the signature, the token. */
export function filesOfHead({ signature, token }: BundledHead): [string, Uint8Array][] {
  const { sequence } = signature;
  return [
    [headFile(sequence, 'json'), statementBytes(signature)],
    [headFile(sequence, 'sig'), hexToBytes(signature.signature)],
    ...(token === null
      ? []
      : ([
          [headFile(sequence, 'tsr'), token.reply],
          [headFile(sequence, 'certificates.pem'), utf8ToBytes(token.certificates)],
        ] as [string, Uint8Array][])),
  ];
}

/** What follows from the document: protocol, result, tables and their description, each once more in a form of its own. */
export function derivedFiles(study: StudyReading): Map<string, Uint8Array> {
  const tables = tablesOf(study);
  return new Map([
    [fileNames.protocol, text(study.parts.protocol)],
    [fileNames.result, text(study.parts.result)],
    [fileNames.dataPackage, utf8ToBytes(dataPackageText(study, tables))],
    ...tables.map((table): [string, Uint8Array] => [`${table.name}.csv`, utf8ToBytes(tableText(table))]),
  ]);
}

/**
 * Every file of a bundle, by name. Pure: the same source gives the same bytes.
 *
 * @throws RangeError when the document is no published study
 */
export function bundleFiles(source: BundleSource): Map<string, Uint8Array> {
  const read = readPublication(source.document);
  if ('fault' in read) throw new RangeError(`the document cannot be read: ${read.fault}`);
  return new Map([
    [fileNames.document, utf8ToBytes(source.document)],
    [fileNames.later, text(source.later)],
    [fileNames.heads, headsText(source)],
    [fileNames.registry, text(source.registry)],
    ...source.heads.flatMap(filesOfHead),
    ...source.keys.map(({ fingerprint, publicKey }): [string, Uint8Array] => [
      keyFile(fingerprint),
      utf8ToBytes(publicKeyPem(publicKey)),
    ]),
    ...derivedFiles(new StudyReading(read.parts)),
    [fileNames.guide, utf8ToBytes(source.guide)],
    [fileNames.recompute, utf8ToBytes(source.recompute)],
  ]);
}
