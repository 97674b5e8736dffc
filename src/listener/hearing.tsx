import type { ListenerView } from '#shared/contracts/listener-live.ts';

type Trial = NonNullable<ListenerView['trial']>;

function nextOf({ familiarisation, presentationNumber, presentations, requests }: Trial, announcement: string): string {
  if (familiarisation) return 'Get to know the sound. Nothing is asked.';
  if (requests !== null) return requests.left === 0 ? 'Next you answer.' : announcement;
  return presentationNumber === presentations ? announcement : 'Just listen.';
}

/** What is heard now, as large as the phone takes it. */
export function Hearing({ trial, announcement }: { trial: Trial; announcement: string }) {
  const isLetter = trial.presentation.length <= 2;
  return (
    <div className="flex flex-1 flex-col items-center justify-center gap-6 py-4 [@media(max-height:699px)]:gap-3 [@media(max-height:699px)]:py-1 text-center">
      <span
        aria-hidden="true"
        className={`leading-none font-bold ${isLetter ? 'text-[min(13rem,28dvh)]' : 'text-[4.5rem] first-letter:uppercase inline-block'}`}
      >
        {trial.presentation}
      </span>
      <div>
        <h1 className="text-xl font-normal text-soft">You are hearing {trial.spoken}.</h1>
        <p className="text-xl text-soft">{nextOf(trial, announcement)}</p>
      </div>
    </div>
  );
}
