import { In, IsNull } from 'typeorm';
import { withTransaction } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { Attendance } from '../features/attendances/attendance.entity.ts';
import { Listener } from '../features/attendances/listener.entity.ts';
import { Cable } from '../features/cables/cable.entity.ts';
import { Specimen } from '../features/cables/specimen.entity.ts';
import { Evidence } from '../features/evidence/evidence.entity.ts';
import { Invitation } from '../features/invitations/invitation.entity.ts';
import { Measurement } from '../features/measurements/measurement.entity.ts';
import { Membership } from '../features/organisations/membership.entity.ts';
import { Organisation } from '../features/organisations/organisation.entity.ts';
import { PastRole } from '../features/organisations/past-role.entity.ts';
import { Publication } from '../features/publications/publication.entity.ts';
import { withdraw } from '../features/publications/publications.service.ts';
import { RigPreset } from '../features/rig-presets/rig-preset.entity.ts';
import { User } from '../features/users/user.entity.ts';
import { OutgoingMail } from '../mail/outgoing-mail.entity.ts';
import { demoPeople } from './demo-people.ts';

const cutShort = 'The making of this demo was cut short; it was made anew.';

/**
 * Removes a demo whose making was cut short: its people, cables and organisation. Its studies were never shown to anyone;
 * what it published cannot be removed, and is withdrawn.
 */
export async function forgetDemo(deps: Deps, organisationId: string): Promise<void> {
  const published = await deps.db.manager.findBy(Publication, { organisationId, withdrawnAt: IsNull() });
  const manager = await deps.db.manager.findOneBy(Membership, { organisationId, role: 'manager' });
  for (const { studyId } of published)
    await withdraw(deps, { organisationId, id: studyId }, manager?.userId ?? organisationId, cutShort);
  return withTransaction(deps.db, async (tx) => {
    const cables = await tx.findBy(Cable, { organisationId });
    const ofCables = { cableId: In(cables.map(({ id }) => id)) };
    const specimens = await tx.findBy(Specimen, ofCables);
    await tx.delete(Measurement, { specimenId: In(specimens.map(({ id }) => id)) });
    await tx.delete(Specimen, ofCables);
    await tx.delete(Evidence, ofCables);
    await tx.delete(Cable, { organisationId });
    await tx.delete(RigPreset, { organisationId });
    await tx.delete(OutgoingMail, { organisationId });
    await tx.delete(Invitation, { organisationId });
    await tx.delete(Attendance, { organisationId });
    await tx.delete(Listener, { organisationId });
    await tx.delete(PastRole, { organisationId });
    await tx.delete(Membership, { organisationId });
    await tx.delete(User, { email: In(demoPeople.map(({ email }) => email)) });
    await tx.delete(Organisation, { id: organisationId });
  });
}
