import { Column, Entity, PrimaryColumn } from 'typeorm';
import type { AuditFault } from '#shared/contracts/audits.ts';

/** What an audit of one organisation's records came to. */
@Entity('audits')
export class Audit {
  @PrimaryColumn({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @PrimaryColumn({ type: 'datetime', precision: 3 })
  at: Date;

  @Column({ type: 'int' })
  studies: number;

  @Column({ type: 'int' })
  entries: number;

  @Column({ type: 'int' })
  signatures: number;

  @Column({ type: 'int' })
  tokens: number;

  /** The first break of each study that has one. */
  @Column({ type: 'json' })
  faults: AuditFault[];
}
