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
  const { phase, digest, checks, fileName } = verification;
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
  if (phase === 'waiting') return <p className="text-soft">Nothing has been checked yet.</p>;
  if (phase !== 'done') return <p className="text-soft">Reading and checking …</p>;
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

function Sum({ checks }: Pick<Verification, 'checks'>) {
  const of = (outcome: Check['outcome']) => checks.filter((check) => check.outcome === outcome).length;
  const [passed, open] = [of('pass'), of('not checkable')];
  if (passed === checks.length) return <Notice tone="held" title={`All ${checks.length} checks pass.`} />;
  if (of('fail') > 0)
    return (
      <Notice tone="stop" title={`${passed} of ${checks.length} checks pass.`}>
        This file does not hold, and supports no conclusion.
      </Notice>
    );
  return (
    <Notice tone="amber" title={`${passed} of ${checks.length} checks pass, and none fails.`}>
      {open === 1 ? 'One cannot be checked' : `${open} cannot be checked`} with what is here; each says why.
    </Notice>
  );
}
