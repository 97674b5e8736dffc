import { useQueries, useQuery } from '@tanstack/react-query';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { ConstructionFacts } from '../features/cables/construction-facts.tsx';
import { ReportSection } from '../features/reports/report-section.tsx';
import { studyQueries } from '../features/studies/studies.queries.ts';
import { formatLength } from '../lib/format.ts';

/** What the compared cables are made of, and the marks of the pieces that were heard; nothing for whoever may not see it. */
export function ReportCables({ organisationId, studyId }: { organisationId: string; studyId: string }) {
  const { data: study } = useQuery(studyQueries.detail(organisationId, studyId));
  const chosen = study?.draft.cables ?? [];
  const ids = [...new Set(chosen.map(({ cableId }) => cableId))];
  const cables = useQueries({ queries: ids.map((id) => cableQueries.detail(organisationId, id)) });
  const sides = chosen.flatMap(({ cableId, specimenIds }, index) => {
    const cable = cables.find(({ data }) => data?.id === cableId)?.data;
    const name = study?.cableNames[index === 0 ? 0 : 1];
    if (cable === undefined || name === undefined) return [];
    return [{ cable, name, pieces: cable.specimens.filter(({ id }) => specimenIds.includes(id)) }];
  });
  if (sides.length < 2) return null;
  return (
    <ReportSection
      title="What was compared"
      lede="Constructions as the cables’ pages state them today; they are no part of the sealed protocol."
    >
      <div className="grid gap-x-16 gap-y-8 lg:grid-cols-2">
        {sides.map(({ cable, name, pieces }) => (
          <div key={name} className="flex min-w-0 flex-col gap-4">
            <h3 className="text-lg">{name}</h3>
            <p>
              {formatLength(cable.lengthMm)}; pieces{' '}
              <span className="font-mono">{pieces.map(({ serial }) => serial).join(', ')}</span>
            </p>
            <ConstructionFacts title={`Construction of ${name}`} construction={cable.construction} />
          </div>
        ))}
      </div>
    </ReportSection>
  );
}
