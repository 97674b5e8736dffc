import { useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { type LoaderFunctionArgs, useParams } from 'react-router-dom';
import { measurementsApi } from '#shared/contracts/measurements.ts';
import { paths } from '../app/paths.ts';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { MeasuredCurves } from '../features/measurements/measured-curves.tsx';
import { MeasurementFacts } from '../features/measurements/measurement-facts.tsx';
import { quantityWords } from '../features/measurements/measurement-words.ts';
import { measurementQueries, useStrikeMeasurement } from '../features/measurements/measurements.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { addressOf } from '../lib/call.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { problemText } from '../lib/show-problem.ts';
import { Button } from '../ui/button.tsx';
import { ConfirmDialog } from '../ui/confirm-dialog.tsx';
import { Notice } from '../ui/notice.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

export async function loader({ params }: LoaderFunctionArgs) {
  const [organisationId, id] = [param(params, 'organisationId'), param(params, 'id')];
  await Promise.all([
    queryClient.ensureQueryData(measurementQueries.detail(organisationId, id, param(params, 'measurementId'))),
    queryClient.ensureQueryData(cableQueries.detail(organisationId, id)),
  ]);
  return null;
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const measurementId = param(useParams(), 'measurementId');
  const { data: measurement } = useSuspenseQuery(measurementQueries.detail(organisationId, id, measurementId));
  const { data: cable } = useSuspenseQuery(cableQueries.detail(organisationId, id));
  const strike = useStrikeMeasurement(organisationId, id, measurementId);
  const [isAsked, setAsked] = useState(false);
  const showToast = useToast();
  const { struck, specimen, quantity, text } = measurement;
  const fileHref = addressOf(measurementsApi.file, { organisationId, id, measurementId });

  function strikeOut(reason: string) {
    strike.mutate(reason, {
      onSuccess: () => {
        setAsked(false);
        showToast('The measurement is struck out.', 'held');
      },
    });
  }

  return (
    <>
      <PageHeader
        title={`${quantityWords[quantity]} of ${specimen.serial}`}
        back={{ to: paths.cable(organisationId, id), label: cable.name }}
        actions={struck === null ? <Button onClick={() => setAsked(true)}>Strike out</Button> : null}
      />
      {struck === null ? null : (
        <Notice tone="stop" title="Struck out." className="mb-8 max-w-3xl">
          {struck.reason}
        </Notice>
      )}
      <div className="grid gap-x-16 gap-y-12 lg:grid-cols-[minmax(0,1fr)_22rem]">
        <section aria-labelledby="values" className="flex min-w-0 flex-col gap-8">
          <h2 id="values" className="text-xl">
            Values
          </h2>
          <MeasuredCurves cable={cable} curves={[measurement]} />
          <details>
            <summary className="inline-block min-h-8 cursor-pointer rounded underline underline-offset-4 hover:decoration-2">
              The text as it was saved
            </summary>
            {/* biome-ignore lint/a11y/noNoninteractiveTabindex: whatever scrolls must be reached by keyboard */}
            <pre tabIndex={0} className="mt-3 max-h-96 overflow-auto border border-rule bg-sheet p-4 font-mono">
              {text}
            </pre>
          </details>
        </section>
        <MeasurementFacts measurement={measurement} fileHref={fileHref} />
      </div>
      <ConfirmDialog
        isOpen={isAsked}
        onOpenChange={setAsked}
        title="Strike out this measurement?"
        consequence="It stays in the list with your reason, and is drawn nowhere any more. This cannot be undone."
        confirmWord="Strike out"
        keepWord="Keep it"
        reason={{ label: 'What is wrong with it' }}
        busy={strike.isPending}
        problem={strike.isError ? problemText(strike.error) : undefined}
        onConfirm={strikeOut}
      />
    </>
  );
}
