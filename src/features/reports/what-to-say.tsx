import type { Finding } from '#shared/findings/finding.ts';
import { Claim } from '../../ui/claim.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';
import { ReportSection } from './report-section.tsx';

/** The sentence that the finding licenses, and what it does not. */
export function WhatToSay({ finding, title = 'What you may say' }: { finding: Finding; title?: string }) {
  return (
    <ReportSection title={title}>
      {finding.maySay === null ? (
        <p className="max-w-3xl">Nothing in public: these numbers support no claim.</p>
      ) : (
        <Claim caution={finding.scope} actions={<CopyButton text={finding.maySay} label="Copy the sentence" />}>
          {finding.maySay}
        </Claim>
      )}
      <div className="flex max-w-3xl flex-col gap-1.5">
        <h3 className="text-lg">What it does not allow to say</h3>
        <ul className="flex list-disc flex-col gap-1 pl-6">
          {finding.mustNotSay.map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
        {finding.maySay === null ? <p className="text-soft">{finding.scope}</p> : null}
      </div>
    </ReportSection>
  );
}
