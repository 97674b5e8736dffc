import { type FormEvent, useState } from 'react';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { adviceOn, adviceWords, responseWords, type SoundLevel, soundResponses } from '#shared/exposure/sound-level.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { NumberField } from '../../ui/number-field.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import type { ConsoleDialogProps } from './console-dialog.ts';
import { Refusal } from './refusal.tsx';

type Typed = { dba: string; response: SoundLevel['response']; instrument: string; place: string; reason: string };

const typedOf = (sound: ProctorView['sound']): Typed => ({
  dba: sound === null ? '' : String(sound.tenthsDba / 10),
  response: sound?.response ?? 'leq',
  instrument: sound?.instrument ?? '',
  place: sound?.place ?? '',
  reason: '',
});

/** Tenths of dBA, or null where no level is typed that can be. A decimal comma is as good as a point. */
function tenthsOf(text: string): number | null {
  const value = Number(text.trim().replace(',', '.'));
  return text.trim() === '' || !Number.isFinite(value) || value < 30 || value > 120 ? null : Math.round(value * 10);
}

/** How loud it is at the listening position. What is typed stays until it is recorded. */
export function SoundDialog({ sound, isOpen, onOpenChange, actions }: ConsoleDialogProps & Pick<ProctorView, 'sound'>) {
  const [typed, setTyped] = useState<Typed>(typedOf(sound));
  const [isAsked, setAsked] = useState(false);
  const change = (part: Partial<Typed>) => setTyped({ ...typed, ...part });
  const tenthsDba = tenthsOf(typed.dba);
  const advice = tenthsDba === null ? null : adviceOn({ tenthsDba });
  const needsReason = advice === 'refused';
  const faults = {
    dba: tenthsDba === null ? 'Write a level from 30 to 120 dBA' : undefined,
    instrument: typed.instrument.trim().length < 2 ? 'Name the meter' : undefined,
    place: typed.place.trim() === '' ? 'Say where it was read' : undefined,
    reason: needsReason && typed.reason.trim().length < 3 ? 'Say why it must be 90 dBA or more' : undefined,
  };
  const fault = (name: keyof typeof faults) => (isAsked ? faults[name] : undefined);

  async function send(event: FormEvent) {
    event.preventDefault();
    event.stopPropagation();
    setAsked(true);
    if (tenthsDba === null || Object.values(faults).some((one) => one !== undefined)) return;
    const { response, instrument, place, reason } = typed;
    const recorded = { tenthsDba, response, instrument: instrument.trim(), place: place.trim(), reason: reason.trim() };
    if (await actions.act({ kind: 'record-sound-level', ...recorded })) {
      setAsked(false);
      onOpenChange(false);
    }
  }

  return (
    <Dialog
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      title="Record the sound level"
      description="Read at the listening position while the programme plays. It goes on the record."
    >
      <form onSubmit={send} noValidate aria-label="Sound level" className="flex flex-col gap-5">
        <div className="grid gap-x-4 gap-y-5 sm:grid-cols-2">
          <NumberField
            label="Level"
            unit="dBA"
            value={typed.dba}
            onChange={(event) => change({ dba: event.target.value })}
            error={fault('dba')}
          />
          <SelectField
            label="Meter set to"
            value={typed.response}
            onChange={(event) => change({ response: event.target.value as SoundLevel['response'] })}
            options={soundResponses.map((response) => ({ value: response, label: responseWords[response] }))}
          />
          <TextField
            label="Meter"
            value={typed.instrument}
            maxLength={80}
            onChange={(event) => change({ instrument: event.target.value })}
            error={fault('instrument')}
          />
          <TextField
            label="Where"
            value={typed.place}
            maxLength={60}
            onChange={(event) => change({ place: event.target.value })}
            error={fault('place')}
            hint="A seat or a place, no names."
          />
        </div>
        <p
          role="status"
          className={advice === 'refused' || advice === 'warned' ? 'font-semibold text-amber' : 'text-soft'}
        >
          {advice === null ? '70 to 80 dBA are recommended.' : adviceWords[advice]}
        </p>
        {needsReason ? (
          <TextAreaField
            label="Why must it be so loud?"
            maxLength={300}
            value={typed.reason}
            onChange={(event) => change({ reason: event.target.value })}
            error={fault('reason')}
          />
        ) : null}
        <Refusal problem={actions.problem} />
        <Button type="submit" variant="primary" busy={actions.isBusy} className="self-start">
          Put it on the record
        </Button>
      </form>
    </Dialog>
  );
}
