import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Sleeve } from '../../ui/sleeve.tsx';

type Shown = NonNullable<ProctorView['inventory']>;

/** Every sleeve once more, so that one that was swapped is found. What is missing is named when it is ended. */
export function Inventory({ inventory }: { inventory: Shown }) {
  const { of, found, foreign } = inventory;
  const left = of - found.length;
  return (
    <section className="flex flex-1 flex-col gap-6">
      <div className="flex flex-col gap-3" aria-live="polite">
        <h2 className="text-step font-bold">
          {found.length} of {of} sleeves
        </h2>
        <p className="max-w-[46rem] text-xl text-soft">
          {left === 0
            ? 'All are in. End the inventory, then finish the session.'
            : 'Every trial has ended. Read every sleeve of the study once more, the unused ones too, one end each.'}
        </p>
      </div>
      <ul aria-label="Found" className="flex flex-wrap gap-4">
        {found.map(({ code }) => (
          <li key={code}>
            <Sleeve code={code} />
          </li>
        ))}
      </ul>
      {foreign.length === 0 ? null : (
        <p className="text-xl font-semibold text-amber">
          Foreign, set apart: {foreign.map(({ code }) => code).join(', ')}
        </p>
      )}
    </section>
  );
}
