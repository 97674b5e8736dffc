import { zodResolver } from '@hookform/resolvers/zod';
import type { Resolver } from 'react-hook-form';
import { type StudyDraft, studyDraft } from '#shared/contracts/studies.ts';
import type { StudyFormValues } from './study-form-values.ts';

const byContract = zodResolver(studyDraft);

/** By the contract; specimens are asked for only once their cable is chosen, for there is nothing to choose from before. */
export const resolveStudy: Resolver<StudyFormValues, unknown, StudyDraft> = async (values, context, options) => {
  const resolved = await byContract(values, context, options);
  const { cables } = resolved.errors;
  for (const fault of [cables?.[0], cables?.[1]]) if (fault?.cableId) delete fault.specimenIds;
  return resolved;
};
