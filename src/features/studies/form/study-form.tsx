import { type ReactNode, useCallback, useRef } from 'react';
import { useForm } from 'react-hook-form';
import type { Cable } from '#shared/contracts/cables.ts';
import type { KeptPreset } from '#shared/contracts/rig-presets.ts';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import type { Member } from '#shared/contracts/users.ts';
import { showProblem } from '../../../lib/show-problem.ts';
import { Form } from '../../../ui/form.tsx';
import { LeaveGuard } from '../../../ui/leave-guard.tsx';
import { PlanProvider } from '../planner/plan-provider.tsx';
import { Planner } from '../planner/planner.tsx';
import { CableFields } from './cable-fields.tsx';
import { CheckFields } from './check-fields.tsx';
import { CodeHolderField } from './code-holder-field.tsx';
import { LevelFields } from './level-fields.tsx';
import { ListeningFields } from './listening-fields.tsx';
import { ProgrammeFields } from './programme-fields.tsx';
import { QuestionFields } from './question-fields.tsx';
import { RigFields } from './rig-fields.tsx';
import type { StudyFormValues } from './study-form-values.ts';
import { resolveStudy } from './study-resolver.ts';

type StudyFormProps<Saved> = {
  values: StudyFormValues;
  cables: readonly Cable[];
  members: readonly Member[];
  isManager: (member: Member) => boolean;
  rigPresets: readonly KeptPreset[];
  /** Where presets are changed and copied. */
  rigPresetsTo: string;
  save: (draft: StudyDraft) => Promise<Saved>;
  /** Where to go once it is saved; nothing typed is lost until then. */
  onSaved: (saved: Saved) => void;
  renderActions: (isSaving: boolean) => ReactNode;
};

/** A study's plan and what it comes to, side by side. Pages say what saving means. */
export function StudyForm<Saved>({
  values,
  cables,
  members,
  isManager,
  rigPresets,
  rigPresetsTo,
  save,
  onSaved,
  renderActions,
}: StudyFormProps<Saved>) {
  const form = useForm<StudyFormValues, unknown, StudyDraft>({
    resolver: resolveStudy,
    defaultValues: values,
  });
  const { isDirty, isSubmitting } = form.formState;
  const isSaved = useRef(false);
  const isUnsaved = useCallback(() => isDirty && !isSaved.current, [isDirty]);

  async function submit(draft: StudyDraft) {
    try {
      const saved = await save(draft);
      isSaved.current = true;
      onSaved(saved);
    } catch (problem) {
      showProblem(form, problem);
    }
  }

  return (
    <>
      <LeaveGuard isUnsaved={isUnsaved} />
      <Form
        form={form}
        onSubmit={submit}
        aria-label="Plan of the study"
        className="lg:grid lg:grid-cols-[minmax(0,32rem)_minmax(0,1fr)] lg:items-start lg:gap-x-16"
        actions={renderActions(isSubmitting)}
      >
        <PlanProvider>
          <div className="flex min-w-0 flex-col gap-6">
            <QuestionFields cables={cables} />
            <CableFields cables={cables} />
            <ListeningFields />
            <ProgrammeFields />
            <CheckFields cables={cables} />
            <RigFields presets={rigPresets} presetsTo={rigPresetsTo} />
            <LevelFields />
            <CodeHolderField members={members} isManager={isManager} />
          </div>
          <Planner />
        </PlanProvider>
      </Form>
    </>
  );
}
