import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { CourseLine } from '../../ui/course-line.tsx';
import { Facts } from '../../ui/facts.tsx';
import { LinkButton } from '../../ui/link-button.tsx';

type EndedProps = { view: ProctorView; back: { to: string; label: string } };

/** What was recorded, and the way back. */
export function Ended({ view, back }: EndedProps) {
  return view.rehearsal ? <Rehearsed back={back} /> : <Recorded view={view} back={back} />;
}

function Rehearsed({ back }: Pick<EndedProps, 'back'>) {
  return (
    <section className="flex max-w-[54rem] flex-1 flex-col gap-6">
      <h2 className="text-step font-bold">The rehearsal is over</h2>
      <p className="text-xl text-soft">
        Nothing of it was kept: no answer, no code, no entry on any record. The session itself is as it was before.
      </p>
      <div>
        <LinkButton to={back.to} variant="primary">
          Back to the sessions
        </LinkButton>
      </div>
    </section>
  );
}

/** Only where there was something to scan. */
function handlingFacts({ scans: { made, byHand, wrong }, inventory }: ProctorView) {
  if (made + byHand + wrong === 0) return [];
  return [
    { label: 'Ends scanned', value: String(made) },
    { label: 'Confirmed by hand', value: String(byHand) },
    { label: 'Wrong labels refused', value: String(wrong) },
    ...(inventory === null ? [] : [{ label: 'Sleeves found', value: `${inventory.found.length} of ${inventory.of}` }]),
  ];
}

function Recorded({ view, back }: EndedProps) {
  const count = (state: string) => view.course.filter((ring) => ring.state === state).length;
  const isFinished = view.phase === 'finished';
  const open = count('open') + count('now');
  return (
    <section className="flex max-w-[54rem] flex-1 flex-col gap-6">
      <h2 className="text-step font-bold">{isFinished ? 'The session is finished' : 'The session was ended early'}</h2>
      <p className="text-xl text-soft">
        Leave the amplifier muted or off, and store the cables as they are, sleeved. Scores stay sealed until the study
        is closed.
      </p>
      <CourseLine trials={view.course} />
      <Facts
        title="On the record"
        facts={[
          { label: 'Trials locked', value: String(count('locked')) },
          { label: 'Trials void', value: String(count('void')) },
          ...(open > 0 ? [{ label: 'Trials not held', value: String(open) }] : []),
          ...handlingFacts(view),
          { label: 'Listeners', value: String(view.seats.length) },
          ...(view.exit === null
            ? []
            : [{ label: 'Exit questions answered', value: `${view.exit.said} of ${view.exit.of}` }]),
          { label: 'Entries of this session', value: String(view.record.sessionEntries) },
          { label: 'Entries of the study', value: String(view.record.entries), tone: 'held' },
        ]}
      />
      <div>
        <LinkButton to={back.to} variant="primary">
          Back to the sessions
        </LinkButton>
      </div>
    </section>
  );
}
