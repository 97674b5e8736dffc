import type { Publication } from '#shared/contracts/publications.ts';

/** Who paid, who supplied, who is tied to whom, and what the publisher confirms. */
export function Statements({ publication }: { publication: Publication }) {
  const { publisher, statements, confirmations } = publication;
  const rows = [
    { label: 'Publisher', value: publisher },
    { label: 'Who paid', value: statements.paid },
    { label: 'Who supplied the specimens', value: statements.supplied },
    { label: 'Ties of the people to the maker', value: statements.ties },
  ];
  return (
    <section aria-labelledby="statements" className="flex min-w-0 flex-col gap-4">
      <h2 id="statements" className="text-xl">
        Who paid, who supplied, who is tied to whom
      </h2>
      <dl className="max-w-4xl border-t-2 border-ink">
        {rows.map(({ label, value }) => (
          <div
            key={label}
            className="grid gap-x-6 border-b border-rule py-2 sm:grid-cols-[16rem_minmax(0,1fr)] print:grid-cols-[16rem_minmax(0,1fr)]"
          >
            <dt className="text-soft">{label}</dt>
            <dd className="whitespace-pre-line">{value}</dd>
          </div>
        ))}
      </dl>
      <h3 className="text-lg">The publisher confirms</h3>
      <ul className="flex max-w-3xl list-disc flex-col gap-1 pl-6">
        {confirmations.map((words) => (
          <li key={words}>{words}</li>
        ))}
      </ul>
    </section>
  );
}
