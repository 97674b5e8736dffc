import type { AuditFault, AuditOutcome } from '#shared/contracts/audits.ts';
import { formatCount, formatDateTime, formatNumber } from '../../lib/format.ts';
import { Facts } from '../../ui/facts.tsx';
import { Notice } from '../../ui/notice.tsx';

/** What the daily audit of all records came to; a break is named with its place. */
export function LatestAudit({ latest }: { latest: AuditOutcome | null }) {
  return (
    <section aria-labelledby="audit" className="flex min-w-0 flex-col gap-4">
      <h2 id="audit" className="text-xl">
        Daily audit
      </h2>
      <p className="text-soft">
        Once a day the server verifies every record: its chain, signatures, tokens and locked answers, and that the
        database refuses to change them.
      </p>
      {latest === null ? (
        <p>No audit has run yet. The first runs some minutes after the server’s start.</p>
      ) : (
        <Outcome latest={latest} />
      )}
    </section>
  );
}

function Outcome({ latest: { at, studies, entries, signatures, tokens, faults } }: { latest: AuditOutcome }) {
  return (
    <>
      {faults.length === 0 ? (
        <Notice tone="held" title="Every record holds.">
          Audited {formatDateTime(at)}.
        </Notice>
      ) : (
        <Notice tone="stop" title={`${formatCount(faults.length, 'fault')} found.`}>
          Audited {formatDateTime(at)}. Keep the database as it is, and compare it with a backup.
        </Notice>
      )}
      {faults.length === 0 ? null : (
        <ul className="flex flex-col border-t border-rule">
          {faults.map((fault) => (
            <Fault key={`${fault.studyId} ${fault.sequence}`} fault={fault} />
          ))}
        </ul>
      )}
      <Facts
        facts={[
          { label: 'Studies with a record', value: formatNumber(studies) },
          { label: 'Entries', value: formatNumber(entries) },
          { label: 'Signatures', value: formatNumber(signatures) },
          { label: 'Tokens', value: formatNumber(tokens) },
        ]}
      />
    </>
  );
}

function Fault({ fault: { title, sequence, why } }: { fault: AuditFault }) {
  return (
    <li className="border-b border-rule py-2 [overflow-wrap:anywhere]">
      <strong>
        {title}
        {sequence === null ? '' : `, entry ${formatNumber(sequence)}`}:
      </strong>{' '}
      {why}.
    </li>
  );
}
