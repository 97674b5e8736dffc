import type { CountedRate, Report } from '#shared/contracts/reports.ts';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/table-column.ts';
import { ReportSection } from './report-section.tsx';
import { limitsOf } from './report-words.ts';

type Row = Report['byExcerpt'][number] & { readonly place: number };

function columnsOf(rates: readonly CountedRate[]): Column<Row>[] {
  return [
    { key: 'excerpt', header: 'Excerpt', isRowHeader: true, cell: ({ title }) => title },
    { key: 'trials', header: 'Trials', isFigure: true, cell: ({ trials }) => trials },
    ...rates.flatMap(({ label }, index): Column<Row>[] => [
      { key: label, header: label, isFigure: true, cell: ({ rates: own }) => countOf(own[index]) },
      {
        key: `${label} limits`,
        header: `${label}, 95 % interval`,
        isFigure: true,
        cell: ({ rates: own }) => limitsOf(own[index]?.interval ?? null),
      },
    ]),
  ];
}

const countOf = (rate: CountedRate | undefined) => (rate === undefined ? '' : `${rate.counted} of ${rate.due}`);

/** Excerpts side by side: counts and limits, never a p. One excerpt alone is the whole result. */
export function ReportExcerpts({ byExcerpt }: Pick<Report, 'byExcerpt'>) {
  const [first, ...others] = byExcerpt;
  if (first === undefined || others.length === 0) return null;
  return (
    <ReportSection
      title="By excerpt"
      lede="Exploratory: excerpts were not registered as questions of their own, so there are counts and limits here and no test. A difference between two of them needs a new registered study."
    >
      <DataTable
        caption="Results by excerpt"
        columns={columnsOf(first.rates)}
        rows={byExcerpt.map((one, place) => ({ ...one, place }))}
        rowKey={({ place }) => String(place)}
        empty={null}
      />
    </ReportSection>
  );
}
