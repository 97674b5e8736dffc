import { Column, Entity, PrimaryColumn } from 'typeorm';

/** The signed head of an organisation's registry at one size. Rows are only ever added. */
@Entity('registry_heads')
export class RegistryHeadRow {
  @PrimaryColumn({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @PrimaryColumn({ type: 'int' })
  size: number;

  @Column({ type: 'char', length: 64 })
  root: string;

  /** ISO 8601 text, exactly as it is signed. */
  @Column({ type: 'char', length: 24 })
  at: string;

  @Column({ type: 'char', length: 64, name: 'key_fingerprint' })
  key: string;

  @Column({ type: 'char', length: 64, name: 'public_key' })
  publicKey: string;

  @Column({ type: 'char', length: 128 })
  signature: string;
}
