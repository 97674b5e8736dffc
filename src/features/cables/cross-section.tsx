import { conductorDiameterMm } from '#shared/cables/contradictions.ts';
import type { Construction } from '#shared/contracts/construction.ts';
import { withUnit } from '../../lib/format.ts';
import { crossSectionLayout, type Disc } from './cross-section-layout.ts';
import { threeDigits } from './si-figure.ts';

/** A cut through the cable, drawn to scale from what is stated. */
export function CrossSection({ construction }: { construction: Construction }) {
  const layout = crossSectionLayout(construction);
  if (layout === undefined) return null;
  const { go, back, shieldRadius, outsideRadius, extent, height } = layout;
  const line = extent / 60;
  const half = extent * 1.04;
  const low = height + extent * 0.16;
  const bar = scaleBar(extent);
  const diameter = conductorDiameterMm(construction) ?? 0;
  const caption = `To scale: conductors with the metal of a ${withUnit(threeDigits(diameter), 'mm')} wire${
    construction.spacingMm === undefined ? '' : `, centres ${withUnit(String(construction.spacingMm), 'mm')} apart`
  }. ${back.length > 0 ? 'Filled goes, hollow returns.' : 'The ring is the shield, the return.'}`;
  return (
    <figure className="flex flex-col gap-2">
      <svg
        role="img"
        aria-label="Cross-section of the cable"
        viewBox={`${-half} ${-height - line} ${2 * half} ${height + low + 3 * line}`}
        className="w-full max-w-72"
      >
        {outsideRadius === undefined ? null : (
          <circle r={outsideRadius} className="fill-sheet stroke-edge" strokeWidth={line} />
        )}
        {shieldRadius === undefined ? null : (
          <circle r={shieldRadius} className="fill-none stroke-edge" strokeWidth={3 * line} />
        )}
        <Discs discs={go} className="fill-ink stroke-page" line={line / 3} />
        <Discs discs={back} className="fill-page stroke-ink" line={line / 2} />
        <path d={`M ${-bar / 2} ${low} h ${bar}`} className="fill-none stroke-ink" strokeWidth={2 * line} />
      </svg>
      <figcaption className="text-soft">
        The bar is {withUnit(String(bar), 'mm')}. {caption}
      </figcaption>
    </figure>
  );
}

function Discs({ discs, className, line }: { discs: readonly Disc[]; className: string; line: number }) {
  return discs.map(({ x, y, radius }) => (
    <circle key={`${x} ${y}`} cx={x} cy={y} r={radius} className={className} strokeWidth={Math.min(line, radius / 4)} />
  ));
}

/** The largest of 1, 2, 5 × a power of ten that is at most the half width. */
function scaleBar(extent: number): number {
  const power = 10 ** Math.floor(Math.log10(extent));
  const step = [5, 2, 1].find((each) => each * power <= extent) ?? 1;
  return Number((step * power).toPrecision(1));
}
