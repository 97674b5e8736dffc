import type { Report } from '#shared/contracts/reports.ts';
import { toldApartWords } from '#shared/session/listeners-told-apart.ts';
import { ReportSection } from './report-section.tsx';

/** From what was planned to what was counted; every loss stands beside the step at which it happened. */
export function ReportFlow({ flow, missingWords }: Pick<Report, 'flow'> & { missingWords: string }) {
  const toldApart = toldApartWords({ listeners: flow.listeners, unlinked: flow.listenersUnlinked });
  return (
    <ReportSection
      title="From plan to count"
      lede="Every opened session and every locked trial counts, those of abandoned sessions too."
    >
      <ol className="grid gap-x-10 gap-y-8 sm:grid-cols-2 xl:grid-cols-4">
        <Step
          count={flow.sessionsOpened}
          of={`of ${flow.sessionsPlanned} planned sessions opened`}
          losses={[
            `${flow.sessionsFinished} finished`,
            `${flow.sessionsAbandoned} abandoned`,
            `${flow.sessionsNeverStarted} never started`,
          ]}
        />
        <Step count={flow.listeners} of="listeners" losses={[`${flow.listenersLeft} left before the end`, toldApart]} />
        <Step
          count={flow.trialsCounted}
          of={`of ${flow.trialsOpened} opened trials counted`}
          losses={[`${flow.trialsVoid} void`, ...checkTrials(flow), ...unlocked(flow)]}
        />
        <Step
          count={flow.answersExpected - flow.answersMissing}
          of={`of ${flow.answersExpected} answers given`}
          losses={[`${flow.answersMissing} missing, ${missingWords}`]}
        />
      </ol>
    </ReportSection>
  );
}

/** Check trials are told apart from those that the result counts. */
function checkTrials({ trialsChecked }: Report['flow']): string[] {
  return trialsChecked === 0 ? [] : [`${trialsChecked} check trials, reported apart`];
}

/** A trial that was open when its session was abandoned is neither locked nor void. */
function unlocked({ trialsOpened, trialsVoid, trialsCounted, trialsChecked }: Report['flow']): string[] {
  const count = trialsOpened - trialsVoid - trialsCounted - trialsChecked;
  return count > 0 ? [`${count} never locked`] : [];
}

type StepProps = { count: number; of: string; losses: readonly string[] };

function Step({ count, of, losses }: StepProps) {
  return (
    <li className="flex flex-col gap-2 border-t-2 border-ink pt-3">
      <p className="flex items-baseline gap-3">
        <span className="font-mono text-2xl font-semibold">{count}</span>
        <span className="text-soft">{of}</span>
      </p>
      <ul className="border-l border-rule pl-4">
        {losses.map((loss) => (
          <li key={loss}>{loss}</li>
        ))}
      </ul>
    </li>
  );
}
