import { useFormContext, useWatch } from 'react-hook-form';
import type { Member } from '#shared/contracts/users.ts';
import { roleWords } from '../../../lib/role-words.ts';
import { Notice } from '../../../ui/notice.tsx';
import { SelectField } from '../../../ui/select-field.tsx';
import { FormSection } from './form-section.tsx';
import type { StudyFormValues } from './study-form-values.ts';

type CodeHolderFieldProps = { members: readonly Member[]; isManager: (member: Member) => boolean };

export function CodeHolderField({ members, isManager }: CodeHolderFieldProps) {
  const { register } = useFormContext<StudyFormValues>();
  const chosenId = useWatch<StudyFormValues, 'codeHolderId'>({ name: 'codeHolderId' });
  const chosen = members.find(({ id }) => id === chosenId);
  const doubling = chosen ? doublingOf(chosen, isManager(chosen)) : null;
  return (
    <FormSection
      title="Who holds the codes"
      lede="Sleeves and codes the specimens, and alone knows which code is which cable until the study is closed."
    >
      <SelectField
        {...register('codeHolderId')}
        label="Code holder"
        placeholder="Choose a member"
        options={members.map(({ id, name, role }) => ({
          value: id,
          label: `${name}, ${roleWords[role].toLowerCase()}`,
        }))}
        hint="Should be none of the study’s manager, proctors, observers and listeners, nor the owner."
      />
      <div aria-live="polite" className="empty:hidden">
        {doubling ? (
          <Notice tone="amber" title={doubling.title}>
            {doubling.text}
          </Notice>
        ) : null}
      </div>
    </FormSection>
  );
}

const cap =
  'the doubled duty is recorded, and whatever the sessions are like, the study counts as listener-blind at most.';

function doublingOf({ name, role }: Member, isManager: boolean): { title: string; text: string } | null {
  const title = 'This caps the blind.';
  if (isManager) return { title, text: `${name} also manages this study: ${cap}` };
  if (role === 'owner') return { title, text: `${name} is the owner: ${cap}` };
  if (role !== 'proctor') return null;
  return { title: 'Keep the duties apart.', text: `${name} must then run no session of this study; otherwise ${cap}` };
}
