import { closedStates } from '#shared/contracts/studies.ts';
import { Problem } from '#shared/problem.ts';
import type { Tx } from '../../db/transaction.ts';
import type { Caller } from '../../http/access.ts';
import { Session } from '../sessions/session.entity.ts';
import { Study } from '../studies/study.entity.ts';
import type { Cable } from './cable.entity.ts';
import { findCable } from './cables.store.ts';

/**
 * The cables whose pages are closed to a person: those of a study that they run a session of as its proctor, until it is
 * closed. Who manages that study has written the cables into it; hiding them would pretend.
 */
export async function cablesClosedTo(tx: Tx, { organisationId, userId }: Caller): Promise<Set<string>> {
  const studies = await tx
    .createQueryBuilder(Study, 'study')
    .innerJoin(Session, 'session', 'session.studyId = study.id')
    .where('session.proctorId = :userId and study.organisationId = :organisationId', { userId, organisationId })
    .andWhere('study.managerId <> :userId and study.state not in (:...closed)', { closed: [...closedStates] })
    .getMany();
  return new Set(studies.flatMap(({ draft }) => draft.cables.map(({ cableId }) => cableId)));
}

/**
 * A cable of the caller's organisation, with its specimens.
 *
 * @throws Problem `not-found`, and `not-allowed` to a proctor of a study that compares it
 */
export async function openCable(tx: Tx, who: Caller, id: string): Promise<Cable> {
  const cable = await findCable(tx, who.organisationId, id);
  if (cable === null) throw new Problem('not-found', 'There is no such cable.');
  if ((await cablesClosedTo(tx, who)).has(id))
    throw new Problem(
      'not-allowed',
      'You run a session that compares this cable. Its pages open to you once the study is closed.',
    );
  return cable;
}
