import { useQueries, useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { type LoaderFunctionArgs, useSearchParams } from 'react-router-dom';
import type { Cable } from '#shared/contracts/cables.ts';
import { paths } from '../app/paths.ts';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { CircuitFields } from '../features/comparison/circuit-fields.tsx';
import { type CircuitValues, readCircuit, usualCircuit } from '../features/comparison/circuit-values.ts';
import { Comparison } from '../features/comparison/comparison.tsx';
import type { PairSide } from '../features/comparison/pair.ts';
import { measurementQueries } from '../features/measurements/measurements.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { formatLength } from '../lib/format.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { SelectField } from '../ui/select-field.tsx';

export function loader({ params }: LoaderFunctionArgs) {
  return queryClient.ensureQueryData(cableQueries.choices(param(params, 'organisationId')));
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const { cables } = useSuspenseQuery(cableQueries.choices(organisationId)).data;
  const [search, setSearch] = useSearchParams();
  const chosen = (name: 'first' | 'second') => cables.find(({ id }) => id === search.get(name));
  const [first, second] = [chosen('first'), chosen('second')];
  const isPair = first !== undefined && second !== undefined && first.id !== second.id;

  function choose(name: string, id: string) {
    setSearch(
      (before) => {
        const next = new URLSearchParams(before);
        next.set(name, id);
        return next;
      },
      { replace: true },
    );
  }

  return (
    <>
      <PageHeader
        title="Compare two cables"
        lede="What their construction and their measurements let expect at the load, from 1 Hz to 100 kHz."
        back={{ to: paths.cables(organisationId), label: 'All cables' }}
        actions={
          isPair ? (
            <LinkButton variant="primary" to={paths.newStudy(organisationId, [first.id, second.id])}>
              Plan a study of these two
            </LinkButton>
          ) : null
        }
      />
      <div className="grid max-w-3xl gap-x-6 gap-y-5 pb-8 sm:grid-cols-2">
        {(['first', 'second'] as const).map((name) => (
          <SelectField
            key={name}
            label={name === 'first' ? 'One cable' : 'The other cable'}
            placeholder="Choose"
            value={chosen(name)?.id ?? ''}
            options={cables.map(({ id, name: word, lengthMm }) => ({
              value: id,
              label: `${word}, ${formatLength(lengthMm)}`,
            }))}
            error={
              name === 'second' && first !== undefined && first === second ? 'Choose two different cables' : undefined
            }
            onChange={({ target }) => choose(name, target.value)}
          />
        ))}
      </div>
      {isPair ? (
        <Pair key={`${first.id} ${second.id}`} organisationId={organisationId} first={first} second={second} />
      ) : (
        <EmptyState title="Choose two cables">
          Their levels at the load are compared here, frequency by frequency.
        </EmptyState>
      )}
    </>
  );
}

function Pair({ organisationId, first, second }: { organisationId: string; first: Cable; second: Cable }) {
  const [values, setValues] = useState<CircuitValues>(() => usualCircuit(first.kind));
  const { circuit, faults } = readCircuit(values);
  const curves = useQueries({
    queries: [first.id, second.id].map((id) => measurementQueries.curves(organisationId, id)),
    combine: (replies) => replies.map(({ data }) => data?.curves ?? []),
  });
  const side = (cable: Cable, index: number): PairSide => ({ cable, curves: curves[index] ?? [] });
  return (
    <div className="flex flex-col gap-10">
      <CircuitFields values={values} faults={faults} onChange={setValues} />
      {circuit === null ? null : <Comparison first={side(first, 0)} second={side(second, 1)} circuit={circuit} />}
    </div>
  );
}
