import { Link } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { CheckList } from '../features/publications/check-list.tsx';
import { NotShown } from '../features/publications/not-shown.tsx';
import { ReceiptCheck } from '../features/publications/receipt-check.tsx';
import { useVerification } from '../features/publications/use-verification.ts';
import { VerificationOutcome } from '../features/publications/verification-outcome.tsx';
import { FileDrop } from '../ui/file-drop.tsx';
import { PageHeader } from '../ui/page-header.tsx';

/** For whoever holds a file and distrusts its publisher: it is checked here and sent nowhere. */
export function Component() {
  const { verification, checkFile, checkReceipts } = useVerification(null);
  const { phase, fileName, checks, names } = verification;
  return (
    <article>
      <PageHeader
        title="Check a published study"
        lede="Bring the bundle of a publication (ZIP), or its record alone (JSON). Your browser reads and checks it; nothing is uploaded, and no account is needed."
        back={{ to: paths.publications(), label: 'All published results' }}
      />
      <div className="grid gap-x-16 gap-y-10 lg:grid-cols-[minmax(0,1fr)_21rem] lg:items-start">
        <section aria-labelledby="checked" className="flex min-w-0 flex-col gap-6">
          <FileDrop onFile={checkFile} />
          <h2 id="checked" className="text-xl [overflow-wrap:anywhere]">
            {fileName === null ? 'What is checked' : `${fileName}, checked in your browser`}
          </h2>
          <div role="status" className="flex flex-col gap-2">
            <VerificationOutcome verification={verification} published={null} />
          </div>
          <CheckList names={names} checks={checks} isRunning={phase === 'fetching' || phase === 'checking'} />
        </section>
        <div className="flex min-w-0 flex-col gap-8">
          <ReceiptCheck key={fileName} verification={verification} onText={checkReceipts} level={2} />
          <section aria-labelledby="no-file" className="flex flex-col gap-2 border-t-2 border-ink pt-4">
            <h2 id="no-file" className="text-base font-bold">
              No file at hand?
            </h2>
            <p className="text-soft">
              Every one of the <Link to={paths.publications()}>published results</Link> has its bundle to download, and
              is checked on its own page too.
            </p>
          </section>
          <NotShown level={2} />
        </div>
      </div>
    </article>
  );
}
