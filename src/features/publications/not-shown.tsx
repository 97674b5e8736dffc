import { notShown } from '#shared/contracts/publications.ts';

/** Beside every check: what none of them can tell. */
export function NotShown({ level }: { level: 2 | 3 }) {
  const Heading = `h${level}` as const;
  return (
    <section aria-labelledby="not-shown" className="flex flex-col gap-2 border-t-2 border-ink pt-4">
      <Heading id="not-shown" className="text-base font-bold">
        What no software can show
      </Heading>
      <p className="text-soft">{notShown} Repeating the test is the cure.</p>
    </section>
  );
}
