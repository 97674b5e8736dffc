import { isUsableCode } from '#shared/session/blind-codes.ts';
import { codeKeyCommitment, drawSecretCommitment } from '#shared/session/commitments.ts';
import type { Tx } from '../db/transaction.ts';
import type { Random } from '../deps.ts';
import { type CodeRow, deleteCodeKey, saveCodeKey, saveDrawSecret } from './secrets.store.ts';

/** A fair number from 0 to 999 by rejection: two bytes reach 65,535; those from 65,000 on are passed over. */
function fairThreeDigits(random: Random): number {
  for (;;) {
    const value = random.bytes('code-key', 2).readUInt16BE(0);
    if (value < 65_000) return value % 1000;
  }
}

/** Three-digit codes that may stand beside one another. */
export function drawCodes(random: Random, count: number): string[] {
  const drawn: string[] = [];
  while (drawn.length < count) {
    const code = String(fairThreeDigits(random)).padStart(3, '0');
    if (isUsableCode(code, drawn)) drawn.push(code);
  }
  return drawn;
}

/** The cable by its place in the protocol: 0 and 1 for the two of the question, check cables after them. */
export type SpecimenToCode = { readonly specimen: string; readonly serial: string; readonly cable: number };

/** Draws a study's blind codes, keeps the code key, and returns the commitment to it. */
export async function commitCodeKey(
  tx: Tx,
  random: Random,
  studyId: string,
  specimens: readonly SpecimenToCode[],
): Promise<string> {
  const codes = drawCodes(random, specimens.length);
  const rows: CodeRow[] = specimens.map(({ specimen, serial, cable }, index) => ({
    code: codes[index] ?? '',
    specimen,
    serial,
    cable,
  }));
  const salt = random.bytes('code-key-salt', 32).toString('hex');
  await saveCodeKey(tx, studyId, { rows, salt });
  return codeKeyCommitment(salt, rows);
}

/** Forgets a code key that is void before anybody listened, so that another can be drawn. */
export function voidCodeKey(tx: Tx, studyId: string): Promise<void> {
  return deleteCodeKey(tx, studyId);
}

/** Makes a session's server secret, keeps it, and returns the commitment to it. */
export async function commitDraw(tx: Tx, random: Random, sessionId: string): Promise<string> {
  const secret = random.bytes('draw-secret', 32).toString('hex');
  const salt = random.bytes('draw-salt', 32).toString('hex');
  await saveDrawSecret(tx, sessionId, { secret, salt });
  return drawSecretCommitment(salt, secret);
}
