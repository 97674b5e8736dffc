// Every check of a published study by its name, in the order in which they are made: known to a page before they have run.

const names = {
  file: 'File readable',
  record: 'Record unbroken',
  published: 'Published as the record says',
  signatures: 'Signatures hold',
  protocol: 'Protocol unchanged since sealing',
  sealingTime: 'Protocol unchanged since its token',
  drawTime: 'Draws fixed, by their tokens, before the first trial',
  commitments: 'Commitments match the revealed secrets',
  codeKey: 'Code key as committed',
  draws: 'Draws recomputed',
  answers: 'Answers match their leaves',
  trials: 'Every drawn trial accounted for',
  sessions: 'Session numbers without gaps',
  listeners: 'One label to a listener',
  rules: 'Exclusions and missing answers by rule',
  figures: 'Figures recomputed',
  flow: 'Numbers add up',
  tables: 'Tables equal the record',
  registry: 'In the publisher’s registry',
} as const;

export type CheckId = keyof typeof names;
export type NamedCheck = { readonly id: CheckId; readonly name: string };

/** What only a bundle brings with it. */
const inBundleAlone: readonly CheckId[] = ['published', 'signatures', 'sealingTime', 'drawTime', 'tables', 'registry'];

export const nameOfCheck = (id: CheckId): string => names[id];

/** The checks of a bundle. */
export const bundleCheckNames: readonly NamedCheck[] = (Object.keys(names) as CheckId[]).map((id) => ({
  id,
  name: names[id],
}));

/** The checks of the record alone. */
export const recordCheckNames = bundleCheckNames.filter(({ id }) => !inBundleAlone.includes(id));
