import type { Report } from '#shared/contracts/reports.ts';
import { formatDateTime } from '../../lib/format.ts';
import { ChangeList } from '../../ui/change-list.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';
import { ReportSection } from './report-section.tsx';

export function ReportProtocol({ protocol }: Pick<Report, 'protocol'>) {
  return (
    <ReportSection
      title="The sealed protocol"
      lede={`Fixed ${formatDateTime(protocol.sealedAt)}, before any answer was given.`}
    >
      <dl className="max-w-4xl border-t-2 border-ink">
        {protocol.facts.map(({ label, value }) => (
          <div
            key={label}
            className="grid gap-x-6 border-b border-rule py-2 sm:grid-cols-[12rem_minmax(0,1fr)] print:grid-cols-[12rem_minmax(0,1fr)]"
          >
            <dt className="text-soft">{label}</dt>
            <dd className="whitespace-pre-line">{value}</dd>
          </div>
        ))}
      </dl>
      {protocol.versions.length > 1 ? <Versions versions={protocol.versions} /> : null}
      <div className="flex flex-col gap-1.5">
        <p className="text-soft">Digest of the protocol, SHA-256</p>
        <code className="break-all">{protocol.digest}</code>
        <CopyButton text={protocol.digest} label="Copy the digest" />
      </div>
    </ReportSection>
  );
}

/** What each amendment changed, and why. */
function Versions({ versions }: Pick<Report['protocol'], 'versions'>) {
  return (
    <div className="flex max-w-4xl flex-col gap-4">
      <h3 className="text-lg">Its versions</h3>
      <ol className="flex flex-col gap-6">
        {versions.map(({ version, sealedAt, reason, changes }) => (
          <li key={version} className="flex min-w-0 flex-col gap-2">
            <p>
              <strong>Version {version}</strong>, sealed {formatDateTime(sealedAt)}, before any session opened. {reason}
            </p>
            {changes.length > 0 ? <ChangeList label={`What version ${version} changed`} changes={changes} /> : null}
          </li>
        ))}
      </ol>
    </div>
  );
}
