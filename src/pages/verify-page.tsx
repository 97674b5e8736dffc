import { notShown } from '#shared/contracts/publications.ts';
import { CheckList } from '../features/publications/check-list.tsx';
import { useVerification } from '../features/publications/use-verification.ts';
import { VerificationOutcome } from '../features/publications/verification-outcome.tsx';
import { FileDrop } from '../ui/file-drop.tsx';

/** For whoever holds a file and distrusts its publisher: it is checked here and sent nowhere. */
export function Component() {
  const { verification, checkFile } = useVerification(null);
  const { phase, fileName, checks, names } = verification;
  return (
    <article className="flex max-w-3xl flex-col gap-8">
      <div className="flex flex-col gap-3">
        <h1 className="text-3xl [overflow-wrap:anywhere]">
          {fileName === null ? 'Check a published study' : `${fileName}, checked`}
        </h1>
        <p className="text-lg text-soft">
          Bring the bundle of a publication (ZIP), or its record alone (JSON). Your browser reads and checks it; nothing
          is uploaded, and this page needs no account.
        </p>
      </div>
      <FileDrop onFile={checkFile} />
      <div role="status" className="flex flex-col gap-2">
        <VerificationOutcome verification={verification} published={null} />
      </div>
      <CheckList names={names} checks={checks} isRunning={phase === 'fetching' || phase === 'checking'} />
      <section aria-labelledby="not-shown" className="flex flex-col gap-2 border-t-2 border-ink pt-4">
        <h2 id="not-shown" className="text-base font-bold">
          What no software can show
        </h2>
        <p className="text-soft">{notShown} Repeating the test is the cure.</p>
      </section>
    </article>
  );
}
