import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** An entry of an organisation's public registry: one sealed version of a protocol. Rows are only ever added. */
@Entity('registry_leaves')
@Index('registry_leaves_version', ['studyId', 'version'], { unique: true })
export class RegistryLeafRow {
  @PrimaryColumn({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  /** Its place in the log, from 0 and without gaps. */
  @PrimaryColumn({ type: 'int', name: 'leaf_index' })
  index: number;

  @Column({ type: 'uuid', name: 'study_id' })
  studyId: string;

  @Column({ type: 'int' })
  version: number;

  @Column({ type: 'char', length: 64 })
  digest: string;

  /** ISO 8601 text, exactly as it is hashed. */
  @Column({ type: 'char', length: 24, name: 'sealed_at' })
  sealedAt: string;

  @Column({ type: 'char', length: 64 })
  hash: string;
}
