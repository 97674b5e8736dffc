import { lazy, Suspense } from 'react';
import { Button } from '../button.tsx';
import { Claim } from '../claim.tsx';
import { CopyButton } from '../copy-button.tsx';
import { Facts } from '../facts.tsx';
import { Figure, FigureRow } from '../figure.tsx';
import { IntervalChart } from '../interval-chart.tsx';
import { Skeleton } from '../skeleton.tsx';
import { fairGuesses } from './fair-guesses.ts';
import { GallerySection } from './gallery-section.tsx';

const NullDistributionChart = lazy(() =>
  import('../null-distribution-chart.tsx').then((module) => ({ default: module.NullDistributionChart })),
);

const claim =
  'In a registered blind test, six listeners, tested one at a time, told our 3 m litz cable from a 3 m solid-core cable more often than guessing (61 of 96; 48 expected).';

const conditions = [
  { label: 'Level match at 1 kHz', value: '0.04 dB' },
  { label: 'Largest, 20 Hz to 20 kHz', value: '0.09 dB' },
  { label: 'Blinding', value: 'listener and proctor', isWords: true },
  { label: 'Check trials passed', value: '6 of 6' },
  { label: 'Chain', value: 'unbroken', isWords: true, tone: 'held' as const },
  { label: 'Voided trials', value: '1, listed', isWords: true, tone: 'amber' as const },
  { label: 'Head', value: '9b1f5c0de27a4b83c6d1907e4f52a8bd31c09a76' },
];

const listeners = [
  { label: 'L01', value: 12, low: 7.6, high: 14.8 },
  { label: 'L02', value: 9, low: 4.8, high: 12.8 },
  { label: 'L03', value: 11, low: 6.6, high: 14.2 },
  { label: 'L04', value: 8, low: 3.9, high: 12.1 },
  { label: 'L05', value: 10, low: 5.7, high: 13.6 },
  { label: 'L06', value: 16, low: 12.7, high: 16 },
];

const distributions = [
  { trials: 96, observed: 61, limit: 57 },
  { trials: 16, observed: 5, limit: 12 },
  { trials: 1200, observed: 571, limit: 630 },
  { trials: 40, observed: 13, beyond: { low: 13, high: 27 } },
];

export function ReportSection() {
  return (
    <GallerySection title="Report">
      <div className="grid gap-12 lg:grid-cols-[minmax(0,1fr)_21rem]">
        <div className="flex min-w-0 flex-col gap-10">
          <FigureRow>
            <Figure isLead value="61 / 96" label="matched correctly" />
            <Figure value="p = 0.0052" label="exact, one-sided" />
            <Figure value="27 %" label="of trials heard, 95 % CI 6 to 46" />
            <Figure value="d′ 1.33" label="0.59 to 1.90" />
          </FigureRow>
          <Claim
            caution="It does not allow “sounds better”: no preference was asked."
            actions={
              <>
                <Button variant="primary">Publish ...</Button>
                <CopyButton text={claim} label="Copy the sentence" />
              </>
            }
          >
            {claim}
          </Claim>
          {distributions.map(({ trials, ...marks }) => (
            <Suspense key={trials} fallback={<Skeleton label="Loading the chart" lines={6} />}>
              <h3 className="-mb-6 text-xl">Where {marks.observed} falls if nobody hears a difference</h3>
              <NullDistributionChart
                {...marks}
                bars={fairGuesses(trials)}
                chanceOf="Chance by guessing"
                quantity={`Correct answers out of ${trials}`}
              />
            </Suspense>
          ))}
          <h3 className="-mb-6 text-xl">By listener</h3>
          <IntervalChart
            caption="Correct answers by listener, with 95 % intervals"
            rowName="Listener"
            rows={listeners}
            middle={{ value: 8, words: 'guessing' }}
            quantity="Correct answers out of 16"
          />
        </div>
        <Facts title="Conditions" facts={conditions} className="self-start" />
      </div>
    </GallerySection>
  );
}
