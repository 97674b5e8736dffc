import type { Tx } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import * as mails from '../../mail/listener-mails.ts';
import type { Session } from '../sessions/session.entity.ts';
import { attendancesOf, holdsSeat } from './attendances.store.ts';
import { changeState } from './seats-and-waiting.service.ts';
import { tell } from './telling.service.ts';

/**
 * A session has moved: whoever holds a seat or waits for one is told, with the next sequence of their calendar entry.
 * Another time asks whoever had accepted anew; another room does not.
 */
export async function tellMoved(tx: Tx, deps: Deps, session: Session, isOtherTime: boolean): Promise<void> {
  for (const attendance of await attendancesOf(tx, session.id)) {
    if (attendance.state === 'waiting') await tell(tx, deps, session, attendance, mails.movedWhileWaitingMail, null);
    if (!holdsSeat(attendance)) continue;
    const asked = isOtherTime ? ({ state: 'invited', answeredAt: null } as const) : { state: attendance.state };
    await changeState(tx, deps, session, attendance, asked);
    await tell(tx, deps, session, attendance, isOtherTime ? mails.movedMail : mails.otherRoomMail, 'REQUEST');
  }
}
