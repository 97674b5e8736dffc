import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** A key by which an organisation signs heads. It is retired and never deleted: what it signed stays verifiable. */
@Entity('signing_keys')
@Index('signing_keys_organisation', ['organisationId', 'createdAt'])
export class SigningKey {
  /** SHA-256 of the public key as a file (SubjectPublicKeyInfo in DER). */
  @PrimaryColumn({ type: 'char', length: 64 })
  fingerprint: string;

  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @Column({ type: 'char', length: 64, name: 'public_key' })
  publicKey: string;

  /** The private part, encrypted; see private-part.ts. */
  @Column({ type: 'varchar', length: 200, name: 'private_part' })
  privatePart: string;

  @Column({ type: 'datetime', precision: 3, name: 'created_at' })
  createdAt: Date;

  /** Who made it; null when the first signature did. */
  @Column({ type: 'uuid', name: 'created_by', nullable: true })
  createdBy: string | null;

  @Column({ type: 'datetime', precision: 3, name: 'retired_at', nullable: true })
  retiredAt: Date | null;

  @Column({ type: 'varchar', length: 500, name: 'retired_reason', nullable: true })
  retiredReason: string | null;
}
