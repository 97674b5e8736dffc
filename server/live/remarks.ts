import type { RemarkCommand } from '#shared/contracts/remarks.ts';
import { aboutOf, remarkLeaf, saidIn } from '#shared/session/remark-leaf.ts';
import type { Remark } from '../features/sessions/remark.entity.ts';
import type { SessionMemory } from './session-memory.ts';

/** The row of what a listener said beside the trials. */
export function remarkRow({ session }: SessionMemory, seat: string, command: RemarkCommand): Remark {
  const { salt } = command;
  const [about, said] = [aboutOf(command), saidIn(command)];
  const leaf = remarkLeaf({ salt, session: session.id, seat, about, said });
  return { sessionId: session.id, seat, about, said, salt, leaf };
}
