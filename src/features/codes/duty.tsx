const parts = [
  ['Alone.', 'Work where nobody sees the specimens without their sleeves. Put away what you print.'],
  ['Tell nobody.', 'Not a colleague, not a hint, not whether you hear a difference, until the study is closed.'],
  [
    'Sleeve the whole length.',
    'Opaque from end to end, with the connectors masked; even out weight and stiffness, so that hands learn nothing.',
  ],
  ['Label both ends.', 'The same code at each end, so that the proctor’s scan catches a wrong plug at either.'],
] as const;

/** What holding the codes entails, said before anything is drawn. */
export function Duty() {
  return (
    <section aria-labelledby="duty" className="flex max-w-3xl flex-col gap-3">
      <h2 id="duty" className="text-xl">
        What this duty entails
      </h2>
      <ol className="border-t-2 border-ink">
        {parts.map(([title, text]) => (
          <li key={title} className="grid gap-x-6 border-b border-rule py-3 sm:grid-cols-[14rem_minmax(0,1fr)]">
            <strong>{title}</strong>
            <span>{text}</span>
          </li>
        ))}
      </ol>
      <p className="text-soft">
        Whoever holds the codes is none of this study’s manager, proctors, observers or listeners. If you are asked to
        be, the blind is capped at listener-blind.
      </p>
    </section>
  );
}
