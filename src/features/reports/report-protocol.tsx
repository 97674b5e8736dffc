import type { Report } from '#shared/contracts/reports.ts';
import { formatDateTime } from '../../lib/format.ts';
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
      <div className="flex flex-col gap-1.5">
        <p className="text-soft">Digest of the protocol, SHA-256</p>
        <code className="break-all">{protocol.digest}</code>
        <CopyButton text={protocol.digest} label="Copy the digest" />
      </div>
    </ReportSection>
  );
}
