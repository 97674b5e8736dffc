import type { Cable } from '#shared/contracts/cables.ts';
import { LinkButton } from '../../ui/link-button.tsx';
import { ConsequenceFigure } from './consequence-figure.tsx';
import { consequenceRows, consequenceWords } from './consequence-rows.ts';
import { CrossSection } from './cross-section.tsx';

/** What follows from a construction, in words, then drawn, then in figures. */
export function Consequences({ cable, editTo }: { cable: Cable; editTo: string }) {
  const { construction, lengthMm } = cable;
  const rows = consequenceRows(construction, lengthMm);
  const isAnythingKnown = rows.some(({ figure }) => figure.isKnown);
  return (
    <section aria-labelledby="consequences" className="flex flex-col gap-5">
      <h2 id="consequences" className="text-xl">
        What follows from the construction
      </h2>
      {isAnythingKnown ? (
        <>
          <div className="max-w-3xl text-lg">
            {consequenceWords(construction, lengthMm).map((sentence) => (
              <p key={sentence}>{sentence}</p>
            ))}
          </div>
          <CrossSection construction={construction} />
          <dl className="border-t-2 border-ink">
            {rows.map((row) => (
              <ConsequenceFigure key={row.label} row={row} />
            ))}
          </dl>
          <p className="max-w-3xl text-soft">
            Worked out from the construction, not measured. Contacts, losses in the insulation and the field of
            neighbouring wires are left out.
          </p>
        </>
      ) : (
        <>
          <p className="max-w-3xl">
            Nothing yet. With the conductor, its cross-section and the geometry, resistance, inductance and capacitance
            are worked out here.
          </p>
          <div>
            <LinkButton to={editTo}>Describe the construction</LinkButton>
          </div>
        </>
      )}
    </section>
  );
}
