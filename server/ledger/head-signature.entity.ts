import { Column, Entity, PrimaryColumn } from 'typeorm';
import type { Moment } from '#shared/ledger/moments.ts';

/** A signed head of a study's record: the entry `sequence`, beside the chain. Rows are only ever added. */
@Entity('head_signatures')
export class HeadSignatureRow {
  @PrimaryColumn({ type: 'uuid', name: 'study_id' })
  studyId: string;

  @PrimaryColumn({ type: 'int' })
  sequence: number;

  @Column({ type: 'char', length: 64 })
  head: string;

  @Column({ type: 'varchar', length: 16 })
  moment: Moment;

  /** ISO 8601 text, exactly as it is signed. */
  @Column({ type: 'char', length: 24 })
  at: string;

  @Column({ type: 'char', length: 64, name: 'key_fingerprint' })
  key: string;

  @Column({ type: 'char', length: 128 })
  signature: string;
}
