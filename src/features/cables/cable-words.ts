import type { Cable } from '#shared/contracts/cables.ts';

export const kindWords: Record<Cable['kind'], string> = {
  loudspeaker: 'Loudspeaker cable',
  interconnect: 'Interconnect',
  headphone: 'Headphone cable',
  other: 'Other',
};
