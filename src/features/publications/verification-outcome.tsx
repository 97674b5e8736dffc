import { Notice } from '../../ui/notice.tsx';
import type { Verification } from './use-verification.ts';

/** What all checks come to, and whether the file is the published one. */
export function VerificationOutcome({ verification, published }: { verification: Verification; published: string }) {
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
  if (phase !== 'done') return <p className="text-soft">Reading and checking …</p>;
  const passed = checks.filter(({ outcome }) => outcome === 'pass').length;
  return (
    <>
      {passed === checks.length ? (
        <Notice tone="held" title={`All ${checks.length} checks pass.`} />
      ) : (
        <Notice tone="stop" title={`${passed} of ${checks.length} checks pass.`}>
          This file does not hold, and supports no conclusion.
        </Notice>
      )}
      <p className="text-soft [overflow-wrap:anywhere]">
        {digest === published
          ? 'It is the file that was published: its SHA-256 digest is the one that this page names.'
          : `It is not the file that was published${fileName === null ? '; it was altered on its way to you' : ''}. Its SHA-256 digest is ${digest}.`}
      </p>
    </>
  );
}
