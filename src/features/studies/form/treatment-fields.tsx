import { useFormContext } from 'react-hook-form';
import { treatmentKinds, treatmentWords } from '#shared/protocol/treatment.ts';
import { Notice } from '../../../ui/notice.tsx';
import { SelectField } from '../../../ui/select-field.tsx';
import { TextAreaField } from '../../../ui/text-area-field.tsx';
import { TextField } from '../../../ui/text-field.tsx';
import { emptyTreatment, type StudyFormValues } from './study-form-values.ts';

/** Whether two cables are compared, or pieces of one of which some were treated. */
export function TreatmentChoice() {
  const { setValue, watch } = useFormContext<StudyFormValues>();
  const isTreatment = watch('treatment') !== undefined;
  const firstId = watch('cables.0.cableId');

  function choose(wanted: string) {
    const isWanted = wanted === 'treatment';
    setValue('treatment', isWanted ? emptyTreatment : undefined, { shouldDirty: true });
    setValue('cables.1', { cableId: isWanted ? firstId : '', specimenIds: [] }, { shouldDirty: true });
  }

  return (
    <SelectField
      label="What is compared"
      value={isTreatment ? 'treatment' : 'cables'}
      options={[
        { value: 'cables', label: 'Two cables' },
        { value: 'treatment', label: 'Pieces of one cable, some of them treated' },
      ]}
      onChange={({ target }) => choose(target.value)}
    />
  );
}

/** What is done to the treated pieces; sealed with the protocol. */
export function TreatmentFields() {
  const { register, watch } = useFormContext<StudyFormValues>();
  if (watch('treatment') === undefined) return null;
  return (
    <div className="flex flex-col gap-5 border-t border-rule pt-4">
      <Notice title="Two groups of pieces of one cable.">
        A listener cannot hear a piece before and after within a trial, so that treated pieces are compared with
        untreated ones. Take at least two of each, choose by lot which are treated, and measure every piece before and
        after: add the measurements on the cable’s page.
      </Notice>
      <div className="grid gap-5 sm:grid-cols-2">
        <SelectField
          label="What is done"
          options={treatmentKinds.map((value) => ({ value, label: treatmentWords[value] }))}
          {...register('treatment.kind')}
        />
        <TextField label="By whom" autoComplete="off" {...register('treatment.by')} />
        <TextField label="For how long" hint="Such as 100 h" autoComplete="off" {...register('treatment.duration')} />
        <TextField
          label="With what signal"
          optional
          hint="Such as pink noise, 10 V into 8 Ω"
          autoComplete="off"
          {...register('treatment.signal')}
        />
      </div>
      <TextAreaField label="Exactly what is done to the treated pieces" rows={2} {...register('treatment.what')} />
    </div>
  );
}
