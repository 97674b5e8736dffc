import type { Cable } from '#shared/contracts/cables.ts';

export const kindWords: Record<Cable['kind'], string> = {
  loudspeaker: 'Loudspeaker cable',
  interconnect: 'Interconnect',
  headphone: 'Headphone cable',
  check: 'Check cable, a known difference',
  other: 'Other',
};
