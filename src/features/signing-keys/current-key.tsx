import type { SigningKey } from '#shared/contracts/signing-keys.ts';
import { readableFingerprint } from '#shared/ledger/readable-fingerprint.ts';
import { publicKeyPem } from '#shared/ledger/signed-head.ts';
import { formatCount, formatDateTime } from '../../lib/format.ts';
import { CopyButton } from '../../ui/copy-button.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { Facts } from '../../ui/facts.tsx';
import { MakeKey, RotateKey } from './rotate-key.tsx';

type CurrentKeyProps = { organisationId: string; current: SigningKey | null };

/** The key that signs now, its fingerprint first: that is what others compare. */
export function CurrentKey({ organisationId, current }: CurrentKeyProps) {
  return (
    <section aria-labelledby="current-key" className="flex min-w-0 flex-col gap-5">
      <div className="flex max-w-3xl flex-col gap-1.5">
        <h2 id="current-key" className="text-xl">
          The key that signs
        </h2>
        <p className="text-soft">
          Whoever checks a record compares this fingerprint with yours over another channel: on your website, in a
          letter, by telephone.
        </p>
      </div>
      {current === null ? (
        <EmptyState title="The first sealing makes a key" action={<MakeKey organisationId={organisationId} />}>
          Make it now to hand out its fingerprint before anything is signed.
        </EmptyState>
      ) : (
        <Key organisationId={organisationId} current={current} />
      )}
    </section>
  );
}

function Key({ organisationId, current }: { organisationId: string; current: SigningKey }) {
  const { fingerprint, publicKey, createdAt, createdBy, heads } = current;
  return (
    <div className="flex max-w-3xl flex-col gap-6">
      <div className="flex flex-col gap-2">
        <p className="text-soft">Fingerprint, SHA-256 of the public key</p>
        <code className="text-lg">{readableFingerprint(fingerprint)}</code>
        <CopyButton text={fingerprint} label="Copy the fingerprint" />
      </div>
      <Facts
        title="This key"
        facts={[
          { label: 'Kind', value: 'Ed25519', isWords: true },
          { label: 'Made', value: formatDateTime(createdAt), isWords: true },
          { label: 'Made by', value: createdBy ?? 'the first signature', isWords: true },
          { label: 'Has signed', value: formatCount(heads, 'head'), isWords: true },
        ]}
      />
      <div className="flex flex-wrap gap-x-12 gap-y-4">
        <CopyButton text={publicKeyPem(publicKey)} label="Copy the public key" />
        <RotateKey organisationId={organisationId} current={current} />
      </div>
    </div>
  );
}
