import { Between } from 'typeorm';
import type { Exposure } from '#shared/contracts/exposure.ts';
import { listenedMinutes, plannedListeningMinutes } from '#shared/exposure/listening-time.ts';
import { type Stay, shareOfDay, shareOfWeek } from '#shared/exposure/sound-dose.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { sessionPlanOf } from '#shared/protocol/protocol.ts';
import { soundEvents } from '#shared/session/sound.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { readSessionEntries } from '../../ledger/ledger.ts';
import { Session } from '../sessions/session.entity.ts';
import { getSession } from '../sessions/sessions.service.ts';
import { protocolOf } from '../studies/studies.service.ts';
import { studyById } from '../studies/studies.store.ts';

const weekMs = 7 * 86_400_000;

type Heard = { readonly stay: Stay | null; readonly isPlanned: boolean };

/** How loud and how long a session was, or will be by its plan; no stay where no level is recorded. */
async function heardIn(tx: Tx, session: Session): Promise<Heard> {
  const study = await studyById(tx, session.studyId);
  const entries = await readSessionEntries(tx, study.id, session.number);
  const isOver = session.phase === 'finished' || session.phase === 'abandoned';
  const recorded = entries.findLast(({ kind }) => kind === 'sound-level-recorded');
  if (recorded === undefined) return { stay: null, isPlanned: !isOver };
  const { tenthsDba } = soundEvents['sound-level-recorded'].parse(recorded.payload);
  const plan = sessionPlanOf(protocolOf(study));
  const minutes = isOver ? listenedMinutes(entries) : plannedListeningMinutes(plan, methodOf(plan.method));
  return { stay: { tenthsDba, minutes }, isPlanned: !isOver };
}

/** The exposure of a session, and of its proctor over the seven days up to it, in all studies of the organisation. */
export async function getExposure(
  { db, ...deps }: Deps,
  who: { organisationId: string; userId: string; role: string | null },
  id: string,
): Promise<Exposure> {
  const row = await getSession({ db, ...deps }, who, id);
  return withTransaction(db, async (tx) => {
    const at = new Date(row.plannedAt);
    const sessions = await tx.findBy(Session, {
      organisationId: who.organisationId,
      proctorId: row.proctorId,
      plannedAt: Between(new Date(at.getTime() - weekMs), at),
    });
    const stays: Stay[] = [];
    let own: Heard = { stay: null, isPlanned: true };
    let unrecorded = 0;
    for (const session of sessions) {
      const heard = await heardIn(tx, session);
      if (session.id === id) own = heard;
      if (heard.stay !== null) stays.push(heard.stay);
      else if (session.phase !== 'planned') unrecorded += 1;
    }
    return {
      session:
        own.stay === null
          ? null
          : {
              ...own.stay,
              isPlanned: own.isPlanned,
              ofWeek: shareOfWeek([own.stay], 'adults'),
              ofWeekSensitive: shareOfWeek([own.stay], 'sensitive'),
              ofDay: shareOfDay([own.stay]),
            },
      week: {
        sessions: stays.length,
        unrecorded,
        ofWeek: shareOfWeek(stays, 'adults'),
        ofWeekSensitive: shareOfWeek(stays, 'sensitive'),
      },
    };
  });
}
