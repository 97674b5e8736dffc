import type { Check } from '#shared/ledger/verify.ts';
import { Notice } from '../../ui/notice.tsx';
import type { Verification } from './use-verification.ts';

type VerificationOutcomeProps = {
  verification: Verification;
  /** Digest of the published document, or null where no publication is meant. */
  published: string | null;
};

/** What all checks come to, and whether the file is the published one. */
export function VerificationOutcome({ verification, published }: VerificationOutcomeProps) {
  const { phase, digest, checks, names, fileName } = verification;
  if (phase === 'unreadable')
    return (
      <Notice tone="amber" title="The file could not be read.">
        {fileName === null ? 'Check the connection, then check again. ' : 'Choose it once more. '}Nothing has been
        verified.
      </Notice>
    );
  if (phase === 'broken')
    return (
      <Notice tone="amber" title="Your browser stopped the check.">
        Reload the page, or download the file and check it elsewhere. Nothing has been verified.
      </Notice>
    );
  if (phase === 'waiting')
    return <Notice title="No file is chosen yet.">These are the checks that it will go through.</Notice>;
  if (phase !== 'done')
    return (
      <p className="text-soft">
        {checks.length === 0 ? 'Reading the file …' : `Checking: ${checks.length} of ${names.length} done …`}
      </p>
    );
  return (
    <>
      <Sum checks={checks} />
      {published === null ? null : (
        <p className="text-soft [overflow-wrap:anywhere]">
          {digest === published
            ? 'It is the document that was published: its SHA-256 digest is the one that this page names.'
            : `It is not the document that was published${fileName === null ? '; it was altered on its way to you' : ''}. Its SHA-256 digest is ${digest ?? 'not to be had'}.`}
        </p>
      )}
    </>
  );
}

const listed = new Intl.ListFormat('en', { type: 'conjunction' });

function Sum({ checks }: Pick<Verification, 'checks'>) {
  const of = (outcome: Check['outcome']) => checks.filter((check) => check.outcome === outcome);
  const [passed, failed, open] = [of('pass'), of('fail'), of('not checkable')];
  const [first] = failed;
  if (first !== undefined)
    return (
      <Notice tone="stop" title={`${passed.length} of ${checks.length} checks pass.`}>
        “{first.name}” fails. This file does not hold, and supports no conclusion.
      </Notice>
    );
  if (open.length === 0) return <Notice tone="held" title={`All ${checks.length} checks pass.`} />;
  return (
    <Notice tone="amber" title={`No check fails; ${passed.length} of ${checks.length} pass.`}>
      {listed.format(open.map(({ name }) => `“${name}”`))} cannot be told from this file. Nothing contradicts it, and
      nothing shows it either; {open.length === 1 ? 'its line says' : 'their lines say'} why.
    </Notice>
  );
}
