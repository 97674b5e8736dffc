import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Button } from '../../ui/button.tsx';
import type { ConsoleActions } from './use-console.ts';

type TrainingProps = {
  training: NonNullable<ProctorView['training']>;
  actions: Pick<ConsoleActions, 'act' | 'isBusy'>;
};

const stepWords = (step: number, steps: number): string => {
  if (steps === 1) return 'the known difference';
  return step === 0 ? `known difference 1 of ${steps}, the largest` : `known difference ${step + 1} of ${steps}`;
};

const stepsOf = (steps: number): number[] => Array.from({ length: steps }, (_, step) => step);

/** What may still be heard before the first trial opens; none of it counts. */
export function Training({ training: { practised, steps }, actions: { act, isBusy } }: TrainingProps) {
  return (
    <section aria-labelledby="training" className="flex flex-col gap-3 border-t border-rule pt-5">
      <h3 id="training" className="text-xl font-bold">
        Train the ears first
      </h3>
      <p className="max-w-[46rem] text-soft">
        As often as anybody likes, until trial 1 begins. Nothing of it counts.
        {practised === 0 ? '' : ` Practice trials so far: ${practised}.`}
      </p>
      <div className="flex flex-wrap gap-3">
        <Button busy={isBusy} onClick={() => void act({ kind: 'begin-familiarisation' })}>
          Both again, labelled
        </Button>
        <Button busy={isBusy} onClick={() => void act({ kind: 'begin-practice', form: 'blind', step: null })}>
          Practise blind
        </Button>
        {stepsOf(steps).map((step) => (
          <Button key={step} busy={isBusy} onClick={() => void act({ kind: 'begin-practice', form: 'feedback', step })}>
            With feedback: {stepWords(step, steps)}
          </Button>
        ))}
      </div>
    </section>
  );
}
