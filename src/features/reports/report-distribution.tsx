import { lazy, Suspense } from 'react';
import type { Report } from '#shared/contracts/reports.ts';
import { Skeleton } from '../../ui/skeleton.tsx';
import { ReportSection } from './report-section.tsx';

const NullDistributionChart = lazy(async () => ({
  default: (await import('../../ui/null-distribution-chart.tsx')).NullDistributionChart,
}));

/** The registered test as a picture: what guessing alone would have given, and what came. */
export function ReportDistribution({ result, nullDistribution }: Pick<Report, 'result' | 'nullDistribution'>) {
  const { correct, answers, critical, test } = result;
  const limit = critical === null ? {} : { limit: critical.count };
  return (
    <ReportSection
      title={`Where ${correct} falls if nobody hears a difference`}
      lede={
        test === 'shared-presentations' ? (
          <>
            <p>
              All listeners of a session heard the same presentations, so there was one coin per trial and not one per
              answer; answers that agree out of habit would make a plain binomial test find differences that nobody
              hears. The registered test therefore keeps the answers as they are, re-draws what X was in all{' '}
              {result.coins.toLocaleString('en')} trials that could change the count, and asks how often a fresh draw
              matches as well as the real one.
            </p>
            <p>Each bar is the chance of that many matches over all draws.</p>
          </>
        ) : (
          <p>
            Each bar is the chance of that many right answers by guessing.
            {critical === null ? '' : ` The registered limit was ${critical.count}.`}
          </p>
        )
      }
    >
      <div className="min-h-[26rem] print:min-h-0">
        <Suspense fallback={<Skeleton label="Drawing the chart" lines={6} />}>
          <NullDistributionChart
            bars={nullDistribution}
            observed={correct}
            quantity={`Right answers out of ${answers}`}
            {...limit}
          />
        </Suspense>
      </div>
    </ReportSection>
  );
}
