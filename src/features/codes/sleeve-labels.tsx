import type { CodeSheet } from '#shared/contracts/codes.ts';
import { QrCode } from './qr-code.tsx';

type Label = { key: string; code: string; mark: string; qrSvg: string; end: 1 | 2 };

/**
 * Two labels for every specimen, one for each end; nothing on them but the code, the study's mark and the end. In the order
 * of the codes, so that nobody who glances at the sheet learns which of them belong together.
 */
export function SleeveLabels({ rows, mark }: Pick<CodeSheet, 'rows' | 'mark'>) {
  const inOrder: Label[] = [...rows]
    .sort((a, b) => a.code.localeCompare(b.code))
    .flatMap(({ code, labels }) => labels.map(({ end, qrSvg }) => ({ key: `${code} ${end}`, code, mark, qrSvg, end })));
  return (
    <section aria-label="Labels for the sleeves">
      <ul className="grid grid-cols-[repeat(auto-fill,minmax(17rem,1fr))] gap-8 print:grid-cols-2 print:gap-[10mm]">
        {inOrder.map(({ key, ...label }) => (
          <SleeveLabel key={key} {...label} />
        ))}
      </ul>
    </section>
  );
}

function SleeveLabel({ code, mark, qrSvg, end }: Omit<Label, 'key'>) {
  return (
    <li
      aria-label={`Label ${code.split('').join(' ')}, end ${end}, mark ${mark.split('').join(' ')}`}
      className="relative flex break-inside-avoid items-center justify-between gap-4 bg-plate p-5 text-plate-ink print:h-[36mm] print:p-[4mm]"
    >
      <CutMarks />
      <span className="flex flex-col items-start gap-1 print:gap-[1mm]">
        <span className="font-mono text-[4.75rem] leading-none font-bold tracking-wide print:text-[19mm]">{code}</span>
        <span className="font-mono text-base leading-none print:text-[3.5mm]">
          {mark} · end {end}
        </span>
      </span>
      <QrCode svg={qrSvg} className="size-24 shrink-0 print:size-[27mm]" />
    </li>
  );
}

const corners = [
  'top-0 left-0 border-t border-l',
  'top-0 right-0 border-t border-r',
  'bottom-0 left-0 border-b border-l',
  'right-0 bottom-0 border-r border-b',
];

/** Where to cut. */
function CutMarks() {
  return corners.map((corner) => (
    <span key={corner} aria-hidden="true" className={`absolute size-4 border-plate-ink print:size-[4mm] ${corner}`} />
  ));
}
