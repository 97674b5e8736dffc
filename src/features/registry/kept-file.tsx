import { useState } from 'react';
import { readKeptFile } from '#shared/ledger/registry.ts';
import { formatCount, formatDateTime } from '../../lib/format.ts';
import { problemText } from '../../lib/show-problem.ts';
import { FileDrop } from '../../ui/file-drop.tsx';
import { Notice } from '../../ui/notice.tsx';
import { checkKept, type KeptOutcome } from './registry.queries.ts';

type State =
  | { readonly phase: 'none' }
  | { readonly phase: 'checking' }
  | { readonly phase: 'refused'; readonly why: string }
  | { readonly phase: 'done'; readonly outcome: KeptOutcome };

const mostBytes = 200_000;

/** Where a visitor gives a head or an entry that they kept, and sees whether the log has only grown since. */
export function KeptFileCheck({ organisationId }: { organisationId: string }) {
  const [state, setState] = useState<State>({ phase: 'none' });

  async function check(file: File) {
    setState({ phase: 'checking' });
    try {
      const kept = file.size > mostBytes ? null : readKeptFile(await file.text());
      setState(
        kept === null
          ? { phase: 'refused', why: `${file.name} is neither a head nor an entry of a registry.` }
          : { phase: 'done', outcome: await checkKept(organisationId, kept) },
      );
    } catch (error) {
      setState({ phase: 'refused', why: `${problemText(error)} Nothing has been checked.` });
    }
  }

  return (
    <section aria-labelledby="kept" className="flex min-w-0 flex-col gap-3 border-t-2 border-ink pt-4">
      <h2 id="kept" className="text-base font-bold">
        Check a head that you kept
      </h2>
      <p className="text-soft">
        Your browser fetches a proof and finds out whether every entry of then is still there, unchanged and in its
        place.
      </p>
      <FileDrop label="Check a head or an entry" onFile={(file) => void check(file)} />
      <div role="status" className="flex flex-col gap-2 [overflow-wrap:anywhere]">
        <Outcome state={state} />
      </div>
    </section>
  );
}

function Outcome({ state }: { state: State }) {
  if (state.phase === 'none') return null;
  if (state.phase === 'checking') return <p className="text-soft">Fetching the proof and checking …</p>;
  if (state.phase === 'refused')
    return (
      <Notice tone="amber" title="Not checked.">
        {state.why}
      </Notice>
    );
  const { kept, now, fault } = state.outcome;
  if (fault !== null)
    return fault.where === 'file' ? (
      <Notice tone="amber" title="Your file does not hold:">
        {fault.why}. It says nothing about this registry.
      </Notice>
    ) : (
      <Notice tone="stop" title="This registry does not hold:">
        {fault.why}. Keep your file, signed {formatDateTime(kept.head.at)}: it shows what this registry was.
      </Notice>
    );
  const more = now.size - kept.head.size;
  return (
    <Notice tone="held" title="The log has only grown.">
      {kept.kind === 'entry' ? `Entry ${kept.index + 1} is in it. ` : ''}
      {formatCount(kept.head.size, 'entry', 'entries')} of {formatDateTime(kept.head.at)}, all unchanged;{' '}
      {more === 0 ? 'none since' : `${formatCount(more, 'entry', 'entries')} since`}.
    </Notice>
  );
}
