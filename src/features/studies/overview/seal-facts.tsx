import { Link } from 'react-router-dom';
import type { Study } from '#shared/contracts/studies.ts';
import { formatDateTime } from '../../../lib/format.ts';
import { CopyButton } from '../../../ui/copy-button.tsx';
import { type Fact, Facts } from '../../../ui/facts.tsx';
import { SealSignature } from './seal-signature.tsx';

/** Who sealed what and when, and where the record stands. */
export function SealFacts({ study, registryTo }: { study: Study; registryTo: string }) {
  const { sealed, record, manager } = study;
  const facts: Fact[] = [{ label: 'Manager', value: manager, isWords: true }];
  if (sealed) {
    facts.push(
      { label: 'Sealed by', value: sealed.sealedBy, isWords: true },
      { label: 'Sealed at', value: formatDateTime(sealed.sealedAt), isWords: true },
      { label: 'Version', value: sealed.version },
    );
  }
  facts.push({ label: 'Entries on the record', value: record.entries });
  return (
    <div className="flex flex-col gap-4">
      <Facts title="Seal and record" facts={facts} />
      {sealed ? <Digest label="Digest of the protocol" value={sealed.digest} /> : null}
      {record.head ? <Digest label="Head of the record" value={record.head} /> : null}
      {sealed ? <Link to={registryTo}>The public registry, as anybody sees it</Link> : null}
      {sealed?.signed ? <SealSignature signed={sealed.signed} /> : null}
    </div>
  );
}

function Digest({ label, value }: { label: string; value: string }) {
  return (
    <div className="flex flex-col gap-1.5">
      <p className="text-soft">{label}, SHA-256</p>
      <code className="break-all">{value}</code>
      <CopyButton text={value} label={`Copy the ${label.startsWith('Digest') ? 'digest' : 'head'}`} />
    </div>
  );
}
