import type { Study } from '#shared/contracts/studies.ts';
import { protocolFacts } from './protocol-facts.ts';

/** What is fixed by the seal, or will be, as one reads it: line by line. */
export function Protocol({ study }: { study: Study }) {
  return (
    <section aria-labelledby="protocol" className="flex flex-col gap-3">
      <h2 id="protocol" className="text-xl">
        {study.sealed ? 'Sealed protocol' : 'Protocol so far'}
      </h2>
      <ProtocolList study={study} />
    </section>
  );
}

export function ProtocolList({ study }: { study: Study }) {
  return (
    <dl className="border-t-2 border-ink">
      {protocolFacts(study).map(({ label, value }) => (
        <div
          key={label}
          className="grid gap-x-6 border-b border-rule py-2 sm:grid-cols-[9.5rem_minmax(0,1fr)] print:grid-cols-[9.5rem_minmax(0,1fr)]"
        >
          <dt className="text-soft">{label}</dt>
          <dd className="whitespace-pre-line">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
