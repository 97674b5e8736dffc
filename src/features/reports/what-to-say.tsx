import type { Finding } from '#shared/findings/finding.ts';
import { Claim } from '../../ui/claim.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';

/** The sentence that the finding licenses, and what it does not. */
export function WhatToSay({ finding }: { finding: Finding }) {
  return (
    <section className="flex flex-col gap-4">
      <h2 className="text-xl">What you may say</h2>
      {finding.maySay === null ? (
        <p>Nothing in public. These numbers support no claim.</p>
      ) : (
        <>
          <Claim>{finding.maySay}</Claim>
          <CopyButton text={finding.maySay} label="Copy the sentence" />
        </>
      )}
      <p className="text-soft">{finding.scope}</p>
      <h3 className="text-lg">What it does not allow you to say</h3>
      <ul className="list-disc pl-5 text-soft">
        {finding.mustNotSay.map((words) => (
          <li key={words}>{words}</li>
        ))}
      </ul>
    </section>
  );
}
