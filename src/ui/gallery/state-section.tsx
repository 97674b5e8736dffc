import { Button } from '../button.tsx';
import { ErrorState } from '../error-state.tsx';
import { Notice } from '../notice.tsx';
import { Progress } from '../progress.tsx';
import { Skeleton } from '../skeleton.tsx';
import { StatusWord } from '../status-word.tsx';
import { GallerySection } from './gallery-section.tsx';

export function StateSection() {
  return (
    <GallerySection title="States">
      <div className="grid gap-8 lg:grid-cols-2">
        <div className="flex flex-col gap-5">
          <Notice>Every change of cable takes 30 s, also when the cable stays.</Notice>
          <Notice tone="held" title="The protocol is sealed.">
            It was registered on 3 March at 09:12 UTC, before the first trial.
          </Notice>
          <Notice tone="amber" title="Only large differences will be found.">
            Two matched cables rarely give more than 60 % right; for that, plan 169 trials.
          </Notice>
          <Notice tone="stop" title="This session was abandoned.">
            Its 12 locked trials count. The reason is on the record.
          </Notice>
          <p className="flex flex-wrap gap-x-6 gap-y-2">
            <StatusWord tone="held" hasDot>
              Record held, 214 entries
            </StatusWord>
            <StatusWord tone="amber">away 40 s</StatusWord>
            <StatusWord tone="now">checking</StatusWord>
            <StatusWord tone="stop">withdrawn</StatusWord>
            <StatusWord>to do</StatusWord>
          </p>
          <Progress label="Answers" value={62} max={96} valueText="62 of 96" />
          <Skeleton label="Loading the sessions" lines={4} />
        </div>
        <div>
          <ErrorState
            title="The report could not be opened"
            detail="The study is still collecting; its result exists only once it is closed."
            kept="Nothing was lost: all 214 entries are on the record."
            advice="Come back when the last session has ended, or look at the progress of the study."
            requestId="7f3e0c52-9a41-4d0f-b6de-0b81c1a7e9d4"
            actions={<Button>Show the progress</Button>}
          />
        </div>
      </div>
    </GallerySection>
  );
}
