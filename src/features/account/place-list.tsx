import { useState } from 'react';
import type { SignedInPlace } from '#shared/contracts/account.ts';
import { formatDateTime } from '../../lib/format.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { useToast } from '../../ui/toast.tsx';
import { useEndOtherPlaces, useEndPlace } from './account.queries.ts';
import { browserWords } from './browser-words.ts';

/** Where one is signed in, and the ends of it. */
export function PlaceList({ places }: { places: readonly SignedInPlace[] }) {
  const columns: Column<SignedInPlace>[] = [
    { key: 'browser', header: 'Browser', isRowHeader: true, cell: ({ browser }) => browserWords(browser) },
    {
      key: 'address',
      header: 'Network address',
      cell: ({ address }) => <span className="font-mono [overflow-wrap:anywhere]">{address}</span>,
    },
    { key: 'signedInAt', header: 'Signed in', cell: ({ signedInAt }) => formatDateTime(signedInAt) },
    { key: 'lastSeenAt', header: 'Last seen', cell: ({ lastSeenAt }) => formatDateTime(lastSeenAt) },
    {
      key: 'end',
      header: 'End',
      cell: (place) => (place.here ? <StatusWord tone="held">This one</StatusWord> : <EndPlace place={place} />),
    },
  ];
  return (
    <div className="flex flex-col items-start gap-6">
      <div className="w-full">
        <DataTable
          caption="Where you are signed in, last seen first"
          columns={columns}
          rows={places}
          rowKey={({ id }) => id}
          empty={null}
        />
      </div>
      {places.length > 1 ? <EndOthers count={places.length - 1} /> : null}
    </div>
  );
}

function EndPlace({ place }: { place: SignedInPlace }) {
  const end = useEndPlace();
  const showToast = useToast();
  return (
    <Button
      busy={end.isPending}
      aria-label={`Sign out ${browserWords(place.browser)}, last seen ${formatDateTime(place.lastSeenAt)}`}
      onClick={() =>
        end.mutate(place.id, {
          onSuccess: () => showToast('That browser is signed out.', 'held'),
          onError: (error) => showToast(problemText(error), 'amber'),
        })
      }
    >
      Sign out
    </Button>
  );
}

function EndOthers({ count }: { count: number }) {
  const [isAsked, setAsked] = useState(false);
  const end = useEndOtherPlaces();
  const showToast = useToast();
  return (
    <>
      <Button variant="stop" onClick={() => setAsked(true)}>
        Sign out everywhere else
      </Button>
      <ConfirmDialog
        isOpen={isAsked}
        onOpenChange={(next) => {
          end.reset();
          setAsked(next);
        }}
        title="Sign out everywhere else?"
        consequence={`${count === 1 ? 'The other browser is' : `The ${count} other browsers are`} signed out; this one stays. A console you have open elsewhere stops; its session is kept as it is.`}
        confirmWord="Sign out everywhere else"
        keepWord="Stay signed in"
        busy={end.isPending}
        problem={end.error === null ? undefined : problemText(end.error)}
        onConfirm={() =>
          end.mutate(undefined, {
            onSuccess: () => {
              setAsked(false);
              showToast('You are signed in here alone.', 'held');
            },
          })
        }
      />
    </>
  );
}
