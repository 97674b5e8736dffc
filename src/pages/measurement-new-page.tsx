import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { MeasurementForm } from '../features/measurements/measurement-form.tsx';
import { useAddMeasurement } from '../features/measurements/measurements.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

export function loader({ params }: LoaderFunctionArgs) {
  return queryClient.ensureQueryData(cableQueries.detail(param(params, 'organisationId'), param(params, 'id')));
}

export function Component() {
  const { person, membership } = usePresence();
  const { organisationId } = membership;
  const id = param(useParams(), 'id');
  const [search] = useSearchParams();
  const navigate = useNavigate();
  const showToast = useToast();
  const { data: cable } = useSuspenseQuery(cableQueries.detail(organisationId, id));
  const add = useAddMeasurement(organisationId, id);
  const specimens = cable.specimens.filter(({ archived }) => !archived);
  const wanted = specimens.find((specimen) => specimen.id === search.get('specimen')) ?? specimens[0];

  return (
    <>
      <PageHeader
        title="Add a measurement"
        lede="Of one piece, from a file or typed. It is never overwritten; a mistaken one is struck out and stays."
        back={{ to: paths.cable(organisationId, id), label: cable.name }}
      />
      {wanted === undefined ? (
        <EmptyState
          title="There is no piece to measure yet"
          action={<LinkButton to={paths.cable(organisationId, id)}>Add a specimen</LinkButton>}
        >
          A measurement belongs to one physical piece: give the first one its mark.
        </EmptyState>
      ) : (
        <MeasurementForm
          specimens={specimens}
          values={{
            specimenId: wanted.id,
            quantity: 'resistance',
            text: '',
            chosen: {},
            instrument: '',
            person: person.name,
            takenOn: today(),
            temperatureC: '',
            moment: 'as-is',
            circuit: { sourceOhms: '', loadOhms: '' },
            note: '',
          }}
          save={add.mutateAsync}
          onSaved={(measurement) => {
            showToast('The measurement is saved.', 'held');
            navigate(paths.measurement(organisationId, id, measurement.id));
          }}
          cancel={<LinkButton to={paths.cable(organisationId, id)}>Cancel</LinkButton>}
        />
      )}
    </>
  );
}

/** In the reader's own zone, as a date field wants it. */
function today(): string {
  const now = new Date();
  return [now.getFullYear(), now.getMonth() + 1, now.getDate()].map((part) => String(part).padStart(2, '0')).join('-');
}
