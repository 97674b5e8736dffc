import { zodResolver } from '@hookform/resolvers/zod';
import { type ReactNode, useCallback, useRef, useState } from 'react';
import { type Resolver, useForm } from 'react-hook-form';
import type { Specimen } from '#shared/contracts/cables.ts';
import { type Measurement, measurementFileBytes, moments } from '#shared/contracts/measurements.ts';
import { quantities } from '#shared/measurements/quantities.ts';
import { readTextFile } from '../../lib/read-text-file.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Actions } from '../../ui/actions.tsx';
import { Button } from '../../ui/button.tsx';
import { FileDrop } from '../../ui/file-drop.tsx';
import { Form } from '../../ui/form.tsx';
import { LeaveGuard } from '../../ui/leave-guard.tsx';
import { Notice } from '../../ui/notice.tsx';
import { NumberField } from '../../ui/number-field.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { type MeasurementValues, type TypedMeasurement, typedMeasurement } from './measurement-values.ts';
import { momentWords, quantityHints, quantityWords } from './measurement-words.ts';
import type { NewMeasurement } from './measurements.queries.ts';
import { TablePreview } from './table-preview.tsx';

type MeasurementFormProps = {
  specimens: readonly Specimen[];
  values: MeasurementValues;
  save: (measurement: NewMeasurement) => Promise<Measurement>;
  onSaved: (measurement: Measurement) => void;
  /** The way out without saving. */
  cancel: ReactNode;
};

/** A table is chosen or typed, shown as it is understood, corrected in place, and saved with where it comes from. */
export function MeasurementForm({ specimens, values, save, onSaved, cancel }: MeasurementFormProps) {
  const form = useForm<MeasurementValues, unknown, TypedMeasurement>({
    resolver: zodResolver(typedMeasurement) as Resolver<MeasurementValues, unknown, TypedMeasurement>,
    defaultValues: values,
  });
  const { register, setValue, watch } = form;
  const { isDirty, isSubmitting } = form.formState;
  const [file, setFile] = useState<File | null>(null);
  const [refusal, setRefusal] = useState('');
  const isSaved = useRef(false);
  const isUnsaved = useCallback(() => isDirty && !isSaved.current, [isDirty]);
  const area = useRef<HTMLTextAreaElement | null>(null);
  const { ref: registerArea, ...textField } = register('text');
  const [text, quantity, chosen] = watch(['text', 'quantity', 'chosen']);

  async function take(taken: File) {
    const why = refusalOf(taken);
    setRefusal(why);
    if (why !== '') return;
    setFile(taken);
    setValue('chosen', {});
    setValue('text', await readTextFile(taken), { shouldDirty: true });
  }

  function goToLine(line: number) {
    const lines = text.split('\n');
    const from = lines.slice(0, line - 1).reduce((sum, each) => sum + each.length + 1, 0);
    area.current?.focus();
    area.current?.setSelectionRange(from, from + (lines[line - 1]?.length ?? 0));
  }

  async function submit({ specimenId, draft }: TypedMeasurement) {
    try {
      const measurement = await save({ specimenId, draft, file });
      isSaved.current = true;
      onSaved(measurement);
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <>
      <LeaveGuard isUnsaved={isUnsaved} />
      <Form
        form={form}
        onSubmit={submit}
        aria-label="Measurement"
        className="max-w-3xl"
        actions={
          <Actions>
            <Button type="submit" variant="primary" busy={isSubmitting} busyLabel="Saving">
              Save this measurement
            </Button>
            {cancel}
          </Actions>
        }
      >
        <div className="grid gap-6 sm:grid-cols-2">
          <SelectField
            label="Piece"
            placeholder="Choose"
            options={specimens.map(({ id, serial }) => ({ value: id, label: serial }))}
            {...register('specimenId')}
          />
          <SelectField
            label="Measured"
            options={quantities.map((value) => ({ value, label: quantityWords[value] }))}
            hint={quantityHints[quantity]}
            {...register('quantity', { onChange: () => setValue('chosen', {}) })}
          />
        </div>
        <FileDrop
          label={file === null ? 'Choose a table' : `Chosen: ${file.name}. Choose another`}
          note="CSV or text, at most 1 MB. Drop it here or choose it; or type the values below. The file is kept as it is."
          accept=".csv,.txt,.tsv,.dat,text/csv,text/plain"
          onFile={take}
        />
        {refusal === '' ? null : <Notice tone="amber" title={refusal} />}
        <TextAreaField
          {...textField}
          ref={(element) => {
            registerArea(element);
            area.current = element;
          }}
          label="Values"
          rows={8}
          spellCheck={false}
          wrap="off"
          hint="One line for each frequency, such as 20;41,3 below a heading such as f/Hz;R/mΩ. One value alone will do."
        />
        <TablePreview
          values={{ text, quantity, chosen }}
          onChoose={(change) => setValue('chosen', change, { shouldDirty: true })}
          onLine={goToLine}
        />
        {quantity === 'level' ? (
          <div className="grid gap-6 sm:grid-cols-2">
            <NumberField
              label="Resistance of the source"
              unit="Ω"
              min={0}
              optional
              {...register('circuit.sourceOhms')}
            />
            <NumberField
              label="Load"
              unit="Ω"
              min={0.1}
              optional
              hint="With both, the prediction is drawn too."
              {...register('circuit.loadOhms')}
            />
          </div>
        ) : null}
        <div className="grid gap-6 sm:grid-cols-2">
          <TextField
            label="Instrument"
            hint="Its model and how it was connected"
            autoComplete="off"
            {...register('instrument')}
          />
          <TextField label="Measured by" autoComplete="off" {...register('person')} />
          <TextField label="Date" type="date" {...register('takenOn')} />
          <NumberField label="Temperature of the cable" unit="°C" optional {...register('temperatureC')} />
          <SelectField
            label="When"
            options={moments.map((value) => ({ value, label: momentWords[value] }))}
            hint="Where something is done to the piece"
            {...register('moment')}
          />
          <TextField label="Note" optional autoComplete="off" {...register('note')} />
        </div>
      </Form>
    </>
  );
}

/** Said before anything is sent. */
function refusalOf({ size, name }: File): string {
  if (size === 0) return `${name} is empty. Choose another file.`;
  if (size > measurementFileBytes) return `${name} is larger than 1 MB. Leave some values out, or choose another file.`;
  return '';
}
