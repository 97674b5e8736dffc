import type { Relation } from 'typeorm';
import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn } from 'typeorm';
import type { Role } from '#shared/contracts/endpoint.ts';
import { User } from '../users/user.entity.ts';
import { Organisation } from './organisation.entity.ts';

@Entity('memberships')
export class Membership {
  @PrimaryColumn({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @PrimaryColumn({ type: 'uuid', name: 'user_id' })
  userId: string;

  @Column({ type: 'varchar', length: 16 })
  role: Role;

  @Column({ type: 'datetime', precision: 3, name: 'joined_at', default: () => 'CURRENT_TIMESTAMP(3)' })
  joinedAt: Date;

  @ManyToOne(() => Organisation)
  @JoinColumn({ name: 'organisation_id', foreignKeyConstraintName: 'memberships_organisation' })
  organisation: Relation<Organisation>;

  @ManyToOne(() => User)
  @JoinColumn({ name: 'user_id', foreignKeyConstraintName: 'memberships_user' })
  user: Relation<User>;
}
