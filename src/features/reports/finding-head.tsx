import type { Report } from '#shared/contracts/reports.ts';
import { PageHeader } from '../../ui/page-header.tsx';

/** The finding in one sentence, and what belongs in its first lines. */
export function FindingHead({ report, back }: { report: Report; back: { to: string; label: string } }) {
  const { finding, title, question } = report;
  return (
    <div className="flex flex-col gap-5">
      <PageHeader title={finding.headline} lede={`${title}. ${question}`} back={back} />
      <ul className="flex flex-col gap-2">
        {finding.modifiers.map((modifier) => (
          <li key={modifier} className="border-l-[5px] border-edge pl-4">
            {modifier}
          </li>
        ))}
      </ul>
    </div>
  );
}
