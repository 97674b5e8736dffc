import { useQueries } from '@tanstack/react-query';
import type { Study } from '#shared/contracts/studies.ts';
import { paths } from '../app/paths.ts';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { readCircuit, usualCircuit } from '../features/comparison/circuit-values.ts';
import { MeasuredPair } from '../features/comparison/measured-pair.tsx';
import { type PairSide, pairDifference } from '../features/comparison/pair.ts';
import { PairPlanning } from '../features/comparison/pair-planning.tsx';
import { measurementQueries } from '../features/measurements/measurements.queries.ts';
import { LinkButton } from '../ui/link-button.tsx';

type StudyPairProps = {
  organisationId: string;
  draft: Study['draft'];
  /** As the study calls them. */
  names: Study['cableNames'];
};

/**
 * What the two cables of a study let expect, from their pages. It is read on its own: where those pages are closed to whoever
 * looks, the study stands without it.
 */
export function StudyPair({ organisationId, draft, names }: StudyPairProps) {
  const ids = draft.cables.map(({ cableId }) => cableId);
  const cables = useQueries({ queries: [...new Set(ids)].map((id) => cableQueries.detail(organisationId, id)) });
  const curves = useQueries({ queries: [...new Set(ids)].map((id) => measurementQueries.curves(organisationId, id)) });
  const side = (index: 0 | 1): PairSide | null => {
    const { cableId, specimenIds } = draft.cables[index];
    const cable = cables.find(({ data }) => data?.id === cableId)?.data;
    const measured = curves[[...new Set(ids)].indexOf(cableId)]?.data?.curves;
    if (cable === undefined || measured === undefined) return null;
    return {
      cable: { ...cable, name: names[index] },
      curves: measured.filter(({ specimen }) => specimenIds.includes(specimen.id)),
    };
  };
  const [first, second] = [side(0), side(1)];
  if (first === null || second === null) return null;
  const { circuit } = readCircuit(usualCircuit(first.cable.kind));
  if (circuit === null || circuit.load.type !== 'resistor') return null;
  const difference = pairDifference(first, second, circuit);
  if (difference.predicted === null && difference.measured === null) return null;
  const isPair = first.cable.id !== second.cable.id;
  return (
    <section aria-labelledby="expected" className="flex flex-col gap-4">
      <div>
        <h2 id="expected" className="pb-1 text-xl">
          What the cables let expect
        </h2>
        <p className="text-soft">
          Between {circuit.sourceOhms} Ω and {circuit.load.resistance.toLocaleString('en')} Ω, from the pages of the
          cables. It is no part of the protocol.
        </p>
      </div>
      <PairPlanning {...difference} />
      <MeasuredPair first={first} second={second} />
      {isPair ? (
        <LinkButton
          className="self-start"
          to={`${paths.compareCables(organisationId, first.cable.id)}&second=${second.cable.id}`}
        >
          Compare them in another circuit
        </LinkButton>
      ) : null}
    </section>
  );
}
