import type { StudyDraft } from '#shared/contracts/studies.ts';
import { type InputFault, Problem } from '#shared/problem.ts';
import type { Tx } from '../../db/transaction.ts';
import { cablesById } from '../cables/cables.store.ts';
import { membersOf } from '../users/users.store.ts';

export const cableIds = (draft: StudyDraft) => draft.cables.map((choice) => choice.cableId);

/**
 * What a draft refers to must be this organisation's, and in use.
 *
 * @param at where the draft stands in what was sent, as a JSON pointer
 */
export async function requireReferences(tx: Tx, organisationId: string, draft: StudyDraft, at = ''): Promise<void> {
  const cables = await cablesById(tx, organisationId, cableIds(draft));
  const faults: InputFault[] = [];
  for (const [index, choice] of draft.cables.entries()) {
    const cable = cables.find(({ id, archived }) => id === choice.cableId && !archived);
    if (cable === undefined) {
      faults.push({ pointer: `${at}/cables/${index}/cableId`, detail: 'This cable is not in use; choose another' });
      continue;
    }
    const inUse = new Set(cable.specimens.filter(({ archived }) => !archived).map(({ id }) => id));
    const isWrong =
      choice.specimenIds.some((id) => !inUse.has(id)) || new Set(choice.specimenIds).size < choice.specimenIds.length;
    if (isWrong)
      faults.push({
        pointer: `${at}/cables/${index}/specimenIds`,
        detail: 'Choose specimens of this cable, each once',
      });
  }
  const members = await membersOf(tx, organisationId);
  if (!members.some(({ userId }) => userId === draft.codeHolderId))
    faults.push({ pointer: `${at}/codeHolderId`, detail: 'The code holder must be a member of your organisation' });
  if (faults.length > 0) throw new Problem('invalid-input', 'Please mend what is marked; nothing was saved.', faults);
}
