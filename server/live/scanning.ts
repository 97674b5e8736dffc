import type { ProctorCommand } from '#shared/contracts/proctor-live.ts';
import { Problem } from '#shared/problem.ts';
import type { SessionCommand } from '#shared/session/decide.ts';
import { isInventoryDue } from '#shared/session/decide-scan.ts';
import { readLabel, studyMark } from '#shared/session/label-text.ts';
import type { Keeper } from './keeper.ts';
import type { SessionMemory } from './session-memory.ts';

type Scan = Extract<ProctorCommand, { kind: 'scan-label' }>;

/** What is decided, and what the proctor is told once it is on the record. */
export type Scanned = { readonly command: SessionCommand; readonly refusal: Problem | null };

/**
 * Compares a label with the code to be fitted, or with the study's codes at the end of the session. A wrong one goes on the
 * record before it is refused.
 *
 * @throws Problem `invalid-input` for a text that is on no label
 */
export async function scanned(memory: SessionMemory, keeper: Keeper, { text, by }: Scan): Promise<Scanned> {
  const label = readLabel(text);
  if (label === null)
    throw new Problem('invalid-input', 'That is no label of a sleeve. Type the three figures, or scan again.');
  const { code, mark, end } = label;
  const own = studyMark(memory.session.studyId);
  const isOthers = mark !== null && mark !== own;
  const others = isOthers ? await othersWords(memory, keeper, { code, mark, own }) : null;
  if (isInventoryDue(memory.state)) {
    const isOurs = !isOthers && (await keeper.codes(memory)).includes(code);
    const told = others ?? `${code} is none of this study’s codes. Set it apart; the record holds it as foreign.`;
    return {
      command: { kind: 'note-inventory-scan', code, by, isOurs },
      refusal: isOurs ? null : new Problem('wrong-label', told),
    };
  }
  const wanted = await keeper.codeToFit(memory);
  const verdict = isOthers ? 'other-study' : code === wanted ? 'wanted' : 'other-code';
  const told =
    others ?? `${code} is in hand, and ${wanted} is wanted. Take ${code} out, fit ${wanted}, scan both ends.`;
  return {
    command: { kind: 'note-scan', code, end, by, verdict },
    refusal: verdict === 'wanted' ? null : new Problem('wrong-label', told),
  };
}

async function othersWords(
  memory: SessionMemory,
  keeper: Keeper,
  { code, mark, own }: { code: string; mark: string; own: string },
): Promise<string> {
  const title = await keeper.titleOfMark(memory, mark);
  const whose = title === null ? `a study with the mark ${mark}` : `${title} (mark ${mark})`;
  return `This label, ${code}, is of ${whose}, not of this study (mark ${own}).`;
}
