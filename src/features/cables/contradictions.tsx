import type { Contradiction } from '#shared/cables/contradictions.ts';
import { Notice } from '../../ui/notice.tsx';
import { constructionLabels } from './construction-words.ts';

/** What does not fit together; it can be saved all the same. */
export function Contradictions({ found }: { found: readonly Contradiction[] }) {
  if (found.length === 0) return null;
  return (
    <Notice tone="amber" title="Not everything fits together.">
      <ul className="flex flex-col gap-1 pt-1">
        {found.map(({ field, detail }) => (
          <li key={`${field} ${detail}`}>
            {constructionLabels[field]}: {detail}.
          </li>
        ))}
      </ul>
    </Notice>
  );
}
