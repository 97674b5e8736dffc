import type { Portrait } from '#shared/methods/portrait.ts';
import { Figure, FigureRow } from '../../ui/figure.tsx';

/** The count leads; p with its test, and an effect only where one is valid. */
export function ReportFigures({ figures, note }: Pick<Portrait, 'figures' | 'note'>) {
  return (
    <div className="flex flex-col gap-3">
      <FigureRow>
        {figures.map(({ value, label }, index) => (
          <Figure key={label} isLead={index === 0} value={value} label={label} />
        ))}
      </FigureRow>
      <p className="max-w-3xl text-soft">{note}</p>
    </div>
  );
}
