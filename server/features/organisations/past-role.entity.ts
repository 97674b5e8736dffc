import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { Role } from '#shared/contracts/endpoint.ts';

/** A role that a person once had: whoever has seen the cables' pages does not unsee them by a change of role. */
@Entity('past_roles')
@Index('past_roles_organisation', ['organisationId'])
export class PastRole {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @Column({ type: 'uuid', name: 'user_id' })
  userId: string;

  @Column({ type: 'varchar', length: 16 })
  role: Role;

  @Column({ type: 'datetime', precision: 3, name: 'ended_at' })
  endedAt: Date;
}
