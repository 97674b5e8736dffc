import type { Prediction } from '#shared/cables/prediction.ts';
import type { ConsequenceRow } from './consequence-rows.ts';
import { constructionLabels } from './construction-words.ts';

/** One figure, and behind a word its formula and source. */
export function ConsequenceFigure({ row }: { row: ConsequenceRow }) {
  const { label, figure, formula, source } = row;
  return (
    <div className="border-b border-rule py-2">
      <dt className="text-soft">{label}</dt>
      <dd className="flex flex-wrap items-baseline justify-between gap-x-6">
        {figure.isKnown ? <span className="font-mono">{figure.value}</span> : <span>{whyNot(figure)}</span>}
        {figure.isKnown ? (
          <details className="open:w-full">
            <summary className="inline-flex min-h-8 cursor-pointer items-center rounded underline underline-offset-4 hover:decoration-2">
              How<span className="sr-only">: {label}</span>
            </summary>
            <p className="max-w-3xl">{formula}.</p>
            <p className="max-w-3xl text-soft">{source}.</p>
          </details>
        ) : null}
      </dd>
    </div>
  );
}

function whyNot(figure: Prediction<string>): string {
  if (figure.isKnown) return '';
  if (figure.because !== undefined) return figure.because;
  return `Not known without: ${figure.lacks.map((field) => constructionLabels[field].toLowerCase()).join(', ')}.`;
}
