import type { CheckDraft } from '#shared/contracts/check-draft.ts';
import type { Agent } from './people.ts';

/** A ladder as a test asks for it; its check cables are added over the API. */
export type Ladder = {
  readonly steps: readonly { milliDb: number; trials: number }[];
  readonly same: number;
  readonly excludes?: boolean;
};

/** Adds a check cable with one specimen for each step, and returns the check trials of a draft. */
export async function addLadder(
  manager: Agent,
  base: string,
  { steps, same, excludes = false }: Ladder,
): Promise<CheckDraft> {
  const made: CheckDraft['steps'] = [];
  for (const { milliDb, trials } of steps) {
    const draft = { name: `Check ${milliDb}`, kind: 'check', lengthMm: 3000, description: '' };
    const cable = await manager.post(`${base}/cables`).send(draft).expect(200);
    const full = await manager
      .post(`${base}/cables/${cable.body.id}/specimens`)
      .send({ serial: `K-${milliDb}`, note: '' })
      .expect(200);
    made.push({ milliDb, trials, cableId: cable.body.id, specimenIds: [full.body.specimens[0].id] });
  }
  return { reference: 0, steps: made, same, excludes };
}
