import type { Cable } from '#shared/contracts/cables.ts';
import { formatDateTime, formatLength } from '../../lib/format.ts';
import { Facts } from '../../ui/facts.tsx';
import { kindWords } from './cable-words.ts';
import { ConstructionFacts } from './construction-facts.tsx';

export function CableFacts({ cable }: { cable: Cable }) {
  return (
    <div className="flex flex-col gap-6">
      <Facts
        title="Design"
        facts={[
          { label: 'Kind', value: kindWords[cable.kind], isWords: true },
          { label: 'Length', value: formatLength(cable.lengthMm) },
          { label: 'Last change', value: formatDateTime(cable.updatedAt), isWords: true },
        ]}
      />
      <ConstructionFacts construction={cable.construction} />
      {cable.description === '' ? null : (
        <section aria-label="Description" className="border-t-2 border-ink pt-4">
          <h3 className="pb-2 text-base font-bold">Description</h3>
          <p className="whitespace-pre-line">{cable.description}</p>
        </section>
      )}
    </div>
  );
}
