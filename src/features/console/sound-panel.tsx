import { useState } from 'react';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { adviceWords, dbaText, responseWords } from '#shared/exposure/sound-level.ts';
import { Button } from '../../ui/button.tsx';
import { SoundDialog } from './sound-dialog.tsx';
import type { ConsoleActions } from './use-console.ts';

type SoundPanelProps = {
  sound: ProctorView['sound'];
  actions: Pick<ConsoleActions, 'act' | 'isBusy' | 'problem' | 'forgetProblem'>;
};

/** How loud it is at the listening position, as it is on the record, or that it is not yet. */
export function SoundPanel({ sound, actions }: SoundPanelProps) {
  const [isOpen, setOpen] = useState(false);
  const isCalm = sound !== null && sound.advice !== 'warned' && sound.advice !== 'refused';
  return (
    <section
      aria-label="Sound level"
      className={`flex flex-wrap items-center justify-between gap-x-8 gap-y-2 border-l-[5px] py-1 pl-4 ${isCalm ? 'border-jacket' : 'border-amber'}`}
    >
      <p className="min-w-0">
        <strong className="mr-3">Sound level</strong>
        {sound === null
          ? 'Not recorded yet: read it at the listening position while the programme plays.'
          : `${dbaText(sound.tenthsDba)} (${responseWords[sound.response]}), ${sound.place}. ${adviceWords[sound.advice]}`}
      </p>
      <Button
        onClick={() => {
          actions.forgetProblem();
          setOpen(true);
        }}
      >
        {sound === null ? 'Record it' : 'Record it anew'}
      </Button>
      <SoundDialog sound={sound} isOpen={isOpen} onOpenChange={setOpen} actions={actions} />
    </section>
  );
}
