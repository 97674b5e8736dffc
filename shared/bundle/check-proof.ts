import { chainFault, type Entry } from '../ledger/chain.ts';
import { fingerprintOf } from '../ledger/signed-head.ts';
import { signaturesFault } from '../ledger/signed-record.ts';
import type { Verdict } from '../ledger/verify.ts';
import { protocolDigest } from '../protocol/protocol.ts';
import { filesOfHead, headFile, keyFile } from './bundle-files.ts';
import type { BundleReading } from './bundle-reading.ts';
import { sameBytes } from './bytes.ts';

/** The record goes on to its publication, which names the digest of the document that is here. */
export function checkPublished(bundle: BundleReading): Verdict {
  // It rests on the record, so that only what came after is to be read.
  const fault = chainFault(bundle.later(), bundle.study.entries().at(-1) ?? null);
  if (fault !== null) return { faults: [`Entry ${fault.sequence}: ${fault.why}.`], held: '' };
  const later = bundle.later();
  const published = later.find(({ kind }) => kind === 'study-published');
  const faults: string[] = [];
  if (published === undefined) faults.push('No later entry says that it was published.');
  else if (published.payload.digest !== bundle.documentDigest())
    faults.push('The document is not the one whose digest the record names.');
  const unknown = later.find(({ kind }) => !['study-published', 'publication-withdrawn'].includes(kind));
  if (unknown !== undefined)
    faults.push(`Entry ${unknown.sequence} came after the document and is no publication: ${unknown.kind}.`);
  const withdrawn = later.find(({ kind }) => kind === 'publication-withdrawn');
  const state = withdrawn === undefined ? '' : ` The publication was withdrawn: ${String(withdrawn.payload.reason)}`;
  return { faults, held: `Entry ${published?.sequence} names the digest of study.json.${state}` };
}

/** Every moment of the record is signed by a key of the organisation, and the files for other programs say the same. */
export function checkSignatures(bundle: BundleReading): Verdict {
  const { keys, heads } = bundle.signed();
  const fault = signaturesFault(bundle.allEntries(), heads, keys);
  const faults: string[] = [];
  const bent = keys.find(({ publicKey, fingerprint }) => fingerprintOf(publicKey) !== fingerprint);
  if (bent !== undefined)
    faults.push(`The key ${bent.fingerprint.slice(0, 16)} does not have the fingerprint that it bears.`);
  if (fault !== null) faults.push(`Entry ${fault.sequence}: ${fault.why}.`);
  if (heads.length === 0) faults.push('No head is signed.');
  for (const head of heads)
    for (const [name, bytes] of filesOfHead({ signature: head, token: null })) {
      const found = bundle.files.get(name);
      if (found === undefined || !sameBytes(found, bytes)) faults.push(`${name} is not what was signed.`);
    }
  const missing = keys.find(({ fingerprint }) => !bundle.files.has(keyFile(fingerprint)));
  if (missing !== undefined) faults.push(`${keyFile(missing.fingerprint)} is missing.`);
  const own = [...new Set(heads.map(({ key }) => key.slice(0, 16)))];
  return {
    faults,
    held: `${heads.length} heads signed by ${own.length === 1 ? 'the key' : 'the keys'} ${own.join(', ')} …; compare the fingerprint with the publisher’s over another channel.`,
  };
}

/** The familiarisation trial, numbered 0, is none. */
const isTrialOpened = ({ kind, payload }: Entry) => kind === 'trial-opened' && Number(payload.trial) > 0;

type Timed = { time: string; isLocal: boolean; authority: string };

/** The token of an entry's head: its time, a fault, or why it says nothing. */
function tokenOf(bundle: BundleReading, entry: Entry | undefined): Timed | { fault: string } | { open: string } {
  const head = entry === undefined ? undefined : bundle.headsBySequence().get(entry.sequence);
  if (entry === undefined || head === undefined) return { open: 'The head is not signed, so that it has no token.' };
  if (head.token === null)
    return { open: `The token for entry ${entry.sequence} had not arrived when the bundle was made.` };
  const verdict = bundle.verdicts.get(entry.sequence);
  if (verdict === undefined) return { fault: `${headFile(entry.sequence, 'tsr')} is missing.` };
  if (verdict.state === 'fault') return { fault: `The token for entry ${entry.sequence}: ${verdict.why}.` };
  if (verdict.state === 'not checkable')
    return { open: `The token for entry ${entry.sequence} is not checked: ${verdict.why}.` };
  return { time: verdict.time, ...head.token };
}

/** An instant of the record in words: to the second, in UTC. What is compared keeps its milliseconds. */
const timeWords = (at: string) => `${at.slice(0, 10)}, ${at.slice(11, 19)} UTC`;

const authorityWords = ({ isLocal, authority }: Timed) =>
  isLocal ? 'the publisher’s own local authority, which proves nothing about time' : authority;

/** The protocol that is here is the one that was sealed, signed and stamped, before the first trial. */
export function checkSealingTime(bundle: BundleReading): Verdict {
  const entries = bundle.study.entries();
  const digest = protocolDigest(bundle.study.protocol());
  const sealing = entries
    .filter(({ payload }) => payload.digest === digest)
    .find(({ kind }) => kind.startsWith('protocol-'));
  const token = tokenOf(bundle, sealing);
  if ('fault' in token) return { faults: [token.fault], held: '' };
  if ('open' in token) return { faults: [], open: token.open, held: '' };
  const first = entries.find(isTrialOpened);
  const said = `Stamped ${timeWords(token.time)} by ${authorityWords(token)}`;
  if (first !== undefined && token.time > first.at)
    return {
      faults: [],
      open: `${said}, after the first trial opened (${timeWords(first.at)}): the token came too late to show that the protocol was there before.`,
      held: '',
    };
  return {
    faults: [],
    held: `${said}; the first trial opened ${first === undefined ? 'never' : timeWords(first.at)}.`,
  };
}

/** In every session the draw was fixed, and stamped, before its first trial opened. */
export function checkDrawTime(bundle: BundleReading): Verdict {
  const entries = bundle.study.entries();
  const fixed = entries.filter(({ kind }) => kind === 'draw-fixed');
  const said: string[] = [];
  const late: string[] = [];
  const firsts = new Map<unknown, Entry>();
  for (const entry of entries)
    if (isTrialOpened(entry) && !firsts.has(entry.payload.session)) firsts.set(entry.payload.session, entry);
  for (const entry of fixed) {
    const { session } = entry.payload;
    const first = firsts.get(session);
    if (first === undefined) continue;
    const token = tokenOf(bundle, entry);
    if ('fault' in token) return { faults: [`Session ${session}: ${token.fault}`], held: '' };
    if ('open' in token) late.push(`Session ${session}: ${token.open}`);
    else if (token.time > first.at)
      late.push(
        `Session ${session}: its token is of ${timeWords(token.time)} by ${authorityWords(token)}, and its first trial opened ${timeWords(first.at)}: too late to show the order.`,
      );
    else said.push(`session ${session} stamped ${timeWords(token.time)} by ${authorityWords(token)}`);
  }
  const [open] = late;
  if (open !== undefined) return { faults: [], open, held: '' };
  return {
    faults: [],
    held: said.length === 0 ? 'No session came to a trial.' : `Before the first trial: ${said.join('; ')}.`,
  };
}
