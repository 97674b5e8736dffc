import type { Report } from '#shared/contracts/reports.ts';
import { gapWords, localTimeWords, type SignedHead } from '#shared/contracts/signed-heads.ts';
import { momentWords } from '#shared/ledger/moments.ts';
import { readableFingerprint } from '#shared/ledger/readable-fingerprint.ts';
import { formatDateTime } from '../../lib/format.ts';
import { buttonLook } from '../../ui/button-look.ts';
import { CopyButton } from '../../ui/copy-button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { ReportSection } from './report-section.tsx';

function Stamped({ token }: Pick<SignedHead, 'token'>) {
  if (token === null) return <StatusWord tone="amber">Waiting for a token</StatusWord>;
  const { authority, isLocal, time, gapMs } = token;
  return (
    <>
      {formatDateTime(time)}
      <span className="block text-soft">
        {isLocal ? <StatusWord tone="amber">local</StatusWord> : authority}, {gapWords(gapMs)}
      </span>
    </>
  );
}

const columns = (keys: readonly string[]): Column<SignedHead>[] => [
  {
    key: 'moment',
    header: 'Moment',
    isRowHeader: true,
    cell: ({ moment, session }) => `${momentWords[moment]}${session === null ? '' : `, session ${session}`}`,
  },
  { key: 'entry', header: 'Entry', isFigure: true, cell: ({ sequence }) => sequence },
  { key: 'signed', header: 'Signed', cell: ({ at }) => formatDateTime(at) },
  ...(keys.length > 1
    ? [{ key: 'key', header: 'Key', cell: ({ key }: SignedHead) => `${keys.indexOf(key) + 1}` }]
    : []),
  { key: 'token', header: 'Time-stamped', cell: ({ token }) => <Stamped token={token} /> },
];

type ReportHeadsProps = Pick<Report, 'record'> & {
  /** Where keys, signatures and tokens can be downloaded. */
  proofs: string;
};

/** The moments at which the record's head was signed and time-stamped, and by which key. */
export function ReportHeads({ record: { heads }, proofs }: ReportHeadsProps) {
  const keys = [...new Set(heads.map(({ key }) => key))];
  const isLocal = heads.some(({ token }) => token?.isLocal);
  return (
    <ReportSection
      title="Signed and time-stamped"
      lede="At each of these moments the head of the record was signed with the organisation’s key, and the signature’s statement was time-stamped. Compare the fingerprint with the one that the organisation gives you over another channel."
    >
      <DataTable
        caption="Signed heads of the record"
        columns={columns(keys)}
        rows={heads}
        rowKey={({ sequence }) => String(sequence)}
        empty={<p className="text-soft">This record is from before heads were signed.</p>}
      />
      {isLocal ? <p className="max-w-3xl text-amber">{localTimeWords}</p> : null}
      {heads.length === 0 ? null : (
        <p className="print:hidden">
          <a href={proofs} download="fairlead-signed-heads.json" className={buttonLook('plain', 'normal')}>
            Download keys, signatures and tokens
          </a>
        </p>
      )}
      {keys.map((key, index) => (
        <div key={key} className="flex flex-col gap-1.5">
          <p className="text-soft">Fingerprint of the key{keys.length > 1 ? ` ${index + 1}` : ''}, SHA-256</p>
          <code>{readableFingerprint(key)}</code>
          <CopyButton text={key} label={keys.length > 1 ? `Copy fingerprint ${index + 1}` : 'Copy the fingerprint'} />
        </div>
      ))}
    </ReportSection>
  );
}
