import type { Report } from '#shared/contracts/reports.ts';
import { formatCount } from '../../lib/format.ts';
import { PageHeader } from '../../ui/page-header.tsx';

type FindingHeadProps = {
  report: Report;
  back: { to: string; label: string };
};

/** The finding in one sentence, how it came about in the next, and whatever modifies it. */
export function FindingHead({ report, back }: FindingHeadProps) {
  const { finding, title, question, conditions } = report;
  return (
    <div className="flex flex-col gap-5">
      <div className="-mb-5">
        <PageHeader title={finding.headline} lede={courseWords(report)} back={back} />
      </div>
      <ul className="flex max-w-3xl flex-col gap-2">
        {[...finding.modifiers, ...conditions].map((modifier) => (
          <li key={modifier} className="border-l-[5px] border-edge pl-4">
            {modifier}
          </li>
        ))}
      </ul>
      <p className="max-w-3xl">
        <strong>{title}.</strong> <span className="text-soft">{question}</span>
      </p>
    </div>
  );
}

/** "48 answers in 16 trials by 3 listeners in 1 session, double-blind to the cable. ..." */
function courseWords({ result, rung, flow }: Report): string {
  const { answers, trials, listeners, sessions, listenersPerSession } = result;
  const who = `${formatCount(listeners, 'listener')}${listenersPerSession === 1 && listeners > 1 ? ', one at a time,' : ''} in ${formatCount(sessions, 'session')}`;
  const course = `${formatCount(answers, 'answer')} due in ${formatCount(trials, 'trial')}, by ${who}, ${rung.name}.`;
  const voids =
    flow.trialsVoid === 0
      ? 'no trial was void.'
      : `${formatCount(flow.trialsVoid, 'trial was', 'trials were')} void and ${flow.trialsVoid === 1 ? 'is' : 'are'} listed.`;
  return `${course} Registered before the first trial; ${voids}`;
}
