import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { Publication } from '#shared/contracts/publications.ts';
import { formatNumber } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { buttonLook } from '../../ui/button-look.ts';
import { CopyButton } from '../../ui/copy-button.tsx';
import { FileDrop } from '../../ui/file-drop.tsx';
import { CheckList } from './check-list.tsx';
import { NotShown } from './not-shown.tsx';
import { ReceiptCheck } from './receipt-check.tsx';
import { useVerification } from './use-verification.ts';
import { VerificationOutcome } from './verification-outcome.tsx';

type VerificationSectionProps = {
  publication: Publication;
  /** The page that checks any file. */
  verifyTo: string;
};

/** The record, checked in the visitor's own browser from the downloaded file; and the file itself, to be checked elsewhere. */
export function VerificationSection({ publication, verifyTo }: VerificationSectionProps) {
  const { file, bundle, registry } = publication;
  const { verification, checkPublished, checkFile, checkReceipts } = useVerification(bundle);
  const { phase, fileName, checks, names } = verification;
  const isRunning = phase === 'fetching' || phase === 'checking';
  return (
    <section
      aria-labelledby="verification"
      className="grid gap-x-16 gap-y-10 lg:grid-cols-[minmax(0,1fr)_21rem] lg:items-start"
    >
      <div className="flex min-w-0 flex-col gap-5">
        <h2 id="verification" className="text-xl [overflow-wrap:anywhere]">
          {fileName === null ? 'Checked in your browser, not by the publisher' : `Your file ${fileName}, checked`}
        </h2>
        <div role="status" className="flex flex-col gap-2">
          <VerificationOutcome verification={verification} published={file.digest} />
        </div>
        <CheckList names={names} checks={checks} isRunning={isRunning} />
        <div className="print:hidden">
          <Button busy={isRunning} busyLabel="Checking" onClick={checkPublished}>
            {fileName === null ? 'Check again' : 'Check the published file'}
          </Button>
        </div>
      </div>
      <WithoutUs file={file} bundle={bundle} registry={registry} verifyTo={verifyTo} onFile={checkFile}>
        <ReceiptCheck key={fileName} verification={verification} onText={checkReceipts} level={3} />
      </WithoutUs>
    </section>
  );
}

type WithoutUsProps = Pick<Publication, 'file' | 'bundle' | 'registry'> & {
  verifyTo: string;
  onFile: (file: File) => void;
  children: ReactNode;
};

function WithoutUs({ file, bundle, registry, verifyTo, onFile, children }: WithoutUsProps) {
  return (
    <div className="flex min-w-0 flex-col gap-8">
      <section aria-labelledby="without-us" className="flex flex-col gap-3 border-t-2 border-ink pt-4">
        <h3 id="without-us" className="text-base font-bold">
          Without us
        </h3>
        <p className="text-soft">Download everything and check it with R and openssl alone; GUIDE.txt says how.</p>
        <a href={bundle} download className={buttonLook('primary', 'normal')}>
          Download the bundle
        </a>
        <pre className="overflow-x-auto rounded border border-rule bg-sheet px-4 py-3 font-mono">
          {'Rscript recompute.R\nopenssl ts -verify …\nsha256sum study.json'}
        </pre>
        <FileDrop onFile={onFile} />
        <p className="text-soft print:hidden">
          <Link to={verifyTo}>Any Fairlead server</Link> checks it as well, this one or another.
        </p>
        <p className="text-soft">SHA-256 of the document in it, study.json</p>
        <code className="break-all">{file.digest}</code>
        <div className="flex flex-wrap gap-3">
          <CopyButton text={file.digest} label="Copy the digest" />
          <a href={file.path} download className={buttonLook('plain', 'normal')}>
            The document alone, {formatNumber(Math.ceil(file.bytes / 1000))} kB
          </a>
        </div>
        <Link to={registry}>Every protocol that this publisher has sealed</Link>
      </section>
      {children}
      <NotShown level={3} />
    </div>
  );
}
