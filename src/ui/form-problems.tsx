import { Notice } from './notice.tsx';

type FormProblemsProps = { problems: readonly string[]; faultyFields: number };

/** The region is always there, so that what appears in it is read out. */
export function FormProblems({ problems, faultyFields }: FormProblemsProps) {
  return (
    <div role="alert" className="empty:hidden">
      {problems.length > 0 ? (
        <Notice tone="amber" title="This did not go through.">
          {problems.join(' ')}
        </Notice>
      ) : null}
      {faultyFields > 0 ? (
        <p className="font-semibold text-amber">
          {faultyFields === 1 ? '1 field above needs a look.' : `${faultyFields} fields above need a look.`}
        </p>
      ) : null}
    </div>
  );
}
