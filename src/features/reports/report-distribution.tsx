import { lazy, Suspense } from 'react';
import type { Report } from '#shared/contracts/reports.ts';
import type { Portrait } from '#shared/methods/portrait.ts';
import { Skeleton } from '../../ui/skeleton.tsx';
import { ReportSection } from './report-section.tsx';

const NullDistributionChart = lazy(async () => ({
  default: (await import('../../ui/null-distribution-chart.tsx')).NullDistributionChart,
}));

type ReportDistributionProps = Pick<Report, 'nullDistribution'> & Pick<Portrait, 'distribution'>;

/** The registered test as a picture: what guessing alone would have given, and what came. */
export function ReportDistribution({ nullDistribution, distribution }: ReportDistributionProps) {
  const { title, lede, ...chart } = distribution;
  return (
    <ReportSection title={title} lede={lede.map((words) => <p key={words}>{words}</p>)}>
      <div className="min-h-[26rem] print:min-h-0">
        <Suspense fallback={<Skeleton label="Drawing the chart" lines={6} />}>
          <NullDistributionChart bars={nullDistribution} {...chart} />
        </Suspense>
      </div>
    </ReportSection>
  );
}
