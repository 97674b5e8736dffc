import type { StudyDraft } from '#shared/contracts/studies.ts';
import { type InputFault, Problem } from '#shared/problem.ts';
import type { Tx } from '../../db/transaction.ts';
import { cablesById } from '../cables/cables.store.ts';
import { membersOf } from '../users/users.store.ts';

/** Every cable that a draft names, with where it stands in the draft and whether it is a check cable. */
function choicesOf({ cables, checks }: StudyDraft) {
  const choice = (where: string, isCheck: boolean) => (one: StudyDraft['cables'][number], index: number) => ({
    pointer: `/${where}/${index}`,
    isCheck,
    cableId: one.cableId,
    specimenIds: one.specimenIds,
  });
  return [...cables.map(choice('cables', false)), ...(checks?.steps ?? []).map(choice('checks/steps', true))];
}

export const cableIds = (draft: StudyDraft) => choicesOf(draft).map((choice) => choice.cableId);

/**
 * What a draft refers to must be this organisation's, and in use.
 *
 * @param at where the draft stands in what was sent, as a JSON pointer
 */
export async function requireReferences(tx: Tx, organisationId: string, draft: StudyDraft, at = ''): Promise<void> {
  const cables = await cablesById(tx, organisationId, cableIds(draft));
  const faults: InputFault[] = [];
  for (const choice of choicesOf(draft)) {
    const cable = cables.find(({ id, archived }) => id === choice.cableId && !archived);
    if (cable === undefined) {
      faults.push({ pointer: `${at}${choice.pointer}/cableId`, detail: 'This cable is not in use; choose another' });
      continue;
    }
    if ((cable.kind === 'check') !== choice.isCheck)
      faults.push({
        pointer: `${at}${choice.pointer}/cableId`,
        detail: choice.isCheck ? 'Choose a cable of the kind “check cable”' : 'A check cable is for check trials alone',
      });
    const inUse = new Set(cable.specimens.filter(({ archived }) => !archived).map(({ id }) => id));
    const isWrong =
      choice.specimenIds.some((id) => !inUse.has(id)) || new Set(choice.specimenIds).size < choice.specimenIds.length;
    if (isWrong)
      faults.push({
        pointer: `${at}${choice.pointer}/specimenIds`,
        detail: 'Choose specimens of this cable, each once',
      });
  }
  const members = await membersOf(tx, organisationId);
  if (!members.some(({ userId }) => userId === draft.codeHolderId))
    faults.push({ pointer: `${at}/codeHolderId`, detail: 'The code holder must be a member of your organisation' });
  if (faults.length > 0) throw new Problem('invalid-input', 'Please mend what is marked; nothing was saved.', faults);
}
