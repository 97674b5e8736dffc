import { type RemarkContent, remarkLeaf } from '../session/remark-leaf.ts';
import type { StudyReading } from './study-reading.ts';

const nameOf = ({ session, seat, about }: Pick<RemarkContent, 'session' | 'seat' | 'about'>) =>
  `${session} ${seat} ${about}`;

/** Every remark has its leaf on the record, and every leaf its remark. */
export function remarkFaults(study: StudyReading): string[] {
  const leaves = new Map(study.remarks().map((remark) => [nameOf(remark), remarkLeaf(remark)]));
  const kept = study.sessions().flatMap(({ sessionId, session, remarks }) =>
    remarks.map(({ seat, about, leaf }) => ({
      name: nameOf({ session: sessionId, seat, about }),
      session,
      seat,
      about,
      leaf,
    })),
  );
  const faults = kept
    .filter(({ name, leaf }) => leaves.get(name) !== leaf)
    .map(
      ({ session, seat, about }) => `Session ${session}, ${seat}, ${about}: what was said does not match the record.`,
    );
  const known = new Set(kept.map(({ name }) => name));
  const stray = study.remarks().find((remark) => !known.has(nameOf(remark)));
  if (stray !== undefined) faults.push(`${stray.seat}, ${stray.about}: the record holds no such remark.`);
  if (leaves.size < study.remarks().length) faults.push('A remark comes twice.');
  return faults;
}
