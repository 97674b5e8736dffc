type ChangeListProps = {
  /** Read out before the lines. */
  label: string;
  changes: readonly { label: string; before: string; after: string }[];
};

/** What changed, line by line: the words that went, struck, and those that came. */
export function ChangeList({ label, changes }: ChangeListProps) {
  return (
    <dl aria-label={label} className="border-t-2 border-ink">
      {changes.map((change) => (
        <div
          key={change.label}
          className="grid gap-x-6 gap-y-1 border-b border-rule py-2 [overflow-wrap:anywhere] sm:grid-cols-[12rem_minmax(0,1fr)]"
        >
          <dt className="text-soft">{change.label}</dt>
          <dd className="flex min-w-0 flex-col gap-1 whitespace-pre-line">
            <Words word="Before" text={change.before} isOld />
            <Words word="Now" text={change.after} />
          </dd>
        </div>
      ))}
    </dl>
  );
}

function Words({ word, text, isOld = false }: { word: string; text: string; isOld?: boolean }) {
  const shown = text === '' ? 'none' : text;
  return (
    <span className="grid grid-cols-[4.5rem_minmax(0,1fr)]">
      <span className="text-soft">{word}</span>
      {isOld && text !== '' ? <del className="text-soft">{shown}</del> : <span>{shown}</span>}
    </span>
  );
}
