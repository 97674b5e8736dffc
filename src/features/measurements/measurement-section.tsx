import type { Cable } from '#shared/contracts/cables.ts';
import type { MeasuredCurve, MeasurementRow } from '#shared/contracts/measurements.ts';
import { LinkButton } from '../../ui/link-button.tsx';
import { ListFilter } from '../../ui/list-filter.tsx';
import { MeasuredCurves } from './measured-curves.tsx';
import { MeasurementTable } from './measurement-table.tsx';
import type { MeasurementListQuery } from './measurements.queries.ts';

type MeasurementSectionProps = {
  cable: Cable;
  curves: readonly MeasuredCurve[];
  measurements: { rows: readonly MeasurementRow[]; total: number; page: number; pages: number };
  query: MeasurementListQuery;
  onChange: (change: Readonly<Record<string, string | number>>) => void;
  addTo: string;
  hrefOf: (id: string) => string;
};

/** How many rows can be taken in without a search. */
const fewRows = 8;

/** What was measured of a cable's pieces: drawn over the prediction, and listed. */
export function MeasurementSection(props: MeasurementSectionProps) {
  const { cable, curves, measurements, query, onChange, addTo, hrefOf } = props;
  const isNone = measurements.total === 0 && query.q === '';
  return (
    <section aria-labelledby="measurements" className="flex flex-col gap-6">
      <div>
        <h2 id="measurements" className="pb-1 text-xl">
          What was measured
        </h2>
        <p className="text-soft">
          {isNone
            ? 'Nothing yet. Resistance, inductance, capacitance, impedance and level of each piece stand here, drawn over what the construction lets expect.'
            : 'The newest of each piece is drawn over what the construction lets expect.'}
        </p>
      </div>
      <MeasuredCurves cable={cable} curves={curves} />
      <LinkButton to={addTo} className="self-start">
        Add a measurement
      </LinkButton>
      {isNone ? null : (
        <div>
          {measurements.total > fewRows || query.q !== '' ? (
            <ListFilter key={query.q} label="Search measurements" words={query.q} onSearch={(q) => onChange({ q })} />
          ) : null}
          <MeasurementTable
            rows={measurements.rows}
            page={measurements.page}
            pageCount={measurements.pages}
            onPage={(page) => onChange({ page })}
            sort={query.sort}
            onSort={(sort) => onChange({ sort })}
            hrefOf={hrefOf}
            empty={<p>Nothing found for “{query.q}”. Pieces, instruments and people were searched.</p>}
          />
        </div>
      )}
    </section>
  );
}
