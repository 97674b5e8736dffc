import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { Role } from '#shared/contracts/endpoint.ts';

@Entity('invitations')
@Index('invitations_organisation', ['organisationId', 'email'])
export class Invitation {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @Column({ type: 'varchar', length: 200 })
  email: string;

  @Column({ type: 'varchar', length: 16 })
  role: Role;

  /** SHA-256 of the link's token: a copy of this table opens nothing. */
  @Index('invitations_token', { unique: true })
  @Column({ type: 'char', length: 64, name: 'token_digest' })
  tokenDigest: string;

  @Column({ type: 'uuid', name: 'invited_by' })
  invitedBy: string;

  @Column({ type: 'datetime', precision: 3, name: 'invited_at' })
  invitedAt: Date;

  @Column({ type: 'datetime', precision: 3, name: 'expires_at' })
  expiresAt: Date;

  @Column({ type: 'datetime', precision: 3, name: 'accepted_at', nullable: true })
  acceptedAt: Date | null;
}
