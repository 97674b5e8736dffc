import { gapWords, localTimeWords, type SignedHead } from '#shared/contracts/signed-heads.ts';
import { readableFingerprint } from '#shared/ledger/readable-fingerprint.ts';
import { formatDateTime } from '../../../lib/format.ts';
import { CopyButton } from '../../../ui/copy-button.tsx';
import { type Fact, Facts } from '../../../ui/facts.tsx';

/** By which key the seal was signed, and who stamped the time on it. */
export function SealSignature({ signed: { at, key, token } }: { signed: SignedHead }) {
  const facts: Fact[] = [{ label: 'Signed at', value: formatDateTime(at), isWords: true }];
  if (token === null) facts.push({ label: 'Time-stamped', value: 'not yet', isWords: true, tone: 'amber' });
  else {
    const { authority, isLocal, time, gapMs } = token;
    facts.push(
      { label: 'Time-stamped', value: formatDateTime(time), isWords: true },
      { label: 'That is', value: gapWords(gapMs), isWords: true },
      { label: 'By', value: authority, isWords: true, ...(isLocal ? { tone: 'amber' as const } : {}) },
    );
  }
  return (
    <div className="flex flex-col gap-4">
      <Facts title="Signature and time" facts={facts} />
      {token?.isLocal ? <p className="text-soft">{localTimeWords}</p> : null}
      {token === null ? (
        <p className="text-soft">The token is fetched in the background; nothing waits for it.</p>
      ) : null}
      <div className="flex flex-col gap-1.5">
        <p className="text-soft">Fingerprint of the key, SHA-256</p>
        <code>{readableFingerprint(key)}</code>
        <CopyButton text={key} label="Copy the fingerprint" />
      </div>
    </div>
  );
}
