/** The first thing the tab key meets; seen only while it has the focus. */
export function SkipLink() {
  return (
    <a
      href="#content"
      className="absolute top-2 left-2 z-50 -translate-y-24 rounded border-2 border-ink bg-sheet px-4 py-2.5 font-semibold focus:translate-y-0"
    >
      Skip to the content
    </a>
  );
}
