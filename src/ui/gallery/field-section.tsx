import { useForm } from 'react-hook-form';
import { Actions } from '../actions.tsx';
import { Button } from '../button.tsx';
import { CheckboxField } from '../checkbox-field.tsx';
import { Form } from '../form.tsx';
import { NumberField } from '../number-field.tsx';
import { RadioGroupField } from '../radio-group-field.tsx';
import { SelectField } from '../select-field.tsx';
import { TextAreaField } from '../text-area-field.tsx';
import { TextField } from '../text-field.tsx';
import { useToast } from '../toast.tsx';
import { GallerySection } from './gallery-section.tsx';

type Draft = {
  title: string;
  question: string;
  trials: number;
  toleranceDb: number;
  method: string;
  running: string;
  isLevelSet: boolean;
};

const methods = [
  { value: 'abx', label: 'ABX' },
  { value: 'triangle', label: 'Triangle' },
  { value: 'duo-trio', label: 'Duo-trio' },
];

const runnings = [
  { value: 'group', label: 'A group, in fixed order', hint: 'All hear the same; any method.' },
  { value: 'single', label: 'A single listener, on request', hint: 'The listener asks for A, B or X.' },
  { value: 'none', label: 'Without a proctor', disabled: true },
];

export function FieldSection() {
  const form = useForm<Draft>({ defaultValues: { title: '', question: '', trials: 42, toleranceDb: 0.1 } });
  const show = useToast();

  function save(draft: Draft) {
    if (draft.title === 'Heron') {
      form.setError('title', { message: 'Another study of yours is called Heron.' });
      form.setError('root', { message: 'Nothing was saved; what you typed is still here.' });
      return;
    }
    show(`${draft.title} is saved.`, 'held');
  }

  return (
    <GallerySection title="Fields and forms" note="Submit it empty, or with the title Heron, to see what it says.">
      <Form
        form={form}
        onSubmit={save}
        aria-label="A study"
        className="max-w-2xl"
        actions={
          <Actions>
            <Button type="submit" variant="primary" busy={form.formState.isSubmitting}>
              Save the draft
            </Button>
            <Button onClick={() => form.reset()}>Start over</Button>
          </Actions>
        }
      >
        <TextField
          label="Neutral title"
          hint="The only name that listeners and the proctor see. No maker, material or price."
          {...form.register('title', { required: 'Write a title of 3 letters or more.' })}
        />
        <TextAreaField
          label="Question"
          hint="In one sentence, as you would ask a listener."
          optional
          {...form.register('question')}
        />
        <div className="grid gap-6 sm:grid-cols-2">
          <NumberField
            label="Trials"
            step={1}
            unit="each listener"
            {...form.register('trials', { valueAsNumber: true, max: { value: 100, message: '100 trials at most.' } })}
          />
          <NumberField label="Level tolerance" unit="dB" {...form.register('toleranceDb', { valueAsNumber: true })} />
        </div>
        <SelectField
          label="Method"
          placeholder="Choose a method"
          options={methods}
          {...form.register('method', { required: 'Choose how the cables are compared.' })}
        />
        <RadioGroupField
          label="How it runs"
          options={runnings}
          {...form.register('running', { required: 'Choose how the session runs.' })}
        />
        <CheckboxField
          label="The level is set and written down"
          hint="Measured at the load, with the meter named in the rig."
          {...form.register('isLevelSet', { required: 'Set the level before the first trial.' })}
        />
      </Form>
      <div className="grid max-w-2xl gap-6 sm:grid-cols-2">
        <TextField label="Serial mark" mono defaultValue="S0-1lI-8B0" />
        <TextField label="Sealed at" readOnly defaultValue="3 March, 09:12 UTC" />
        <TextField label="Registry number" disabled defaultValue="given when sealed" />
        <TextField label="Session code" error="No session has this code. Look at the proctor's screen." />
      </div>
    </GallerySection>
  );
}
