import type { WaitingItem } from '#shared/contracts/users.ts';
import { formatDateTime } from '../../lib/format.ts';
import { LinkButton } from '../../ui/link-button.tsx';
import type { HomePlaces } from './home-places.ts';
import { nextActOf } from './next-act.ts';

type WaitingListProps = { items: readonly WaitingItem[]; places: HomePlaces };

/** What waits for whoever looks, each with its next act; the first is the one to do now. */
export function WaitingList({ items, places }: WaitingListProps) {
  return (
    <ul className="border-t-2 border-ink">
      {items.map((item, index) => {
        const act = nextActOf(item, places);
        return (
          <li
            key={`${item.kind} ${item.studyId} ${item.sessionId}`}
            className="flex flex-wrap items-center justify-between gap-x-10 gap-y-4 border-b border-rule py-5"
          >
            <div className="min-w-0 flex-1 basis-72">
              <h2 className="text-lg">{item.title}</h2>
              <p>{item.detail}</p>
              <p className="text-soft">
                Since <time dateTime={item.since}>{formatDateTime(item.since)}</time>
              </p>
            </div>
            <LinkButton variant={index === 0 ? 'primary' : 'plain'} to={act.to}>
              {act.word}
              <span className="sr-only">: {item.title}</span>
            </LinkButton>
          </li>
        );
      })}
    </ul>
  );
}
