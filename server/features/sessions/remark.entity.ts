import { Column, Entity, PrimaryColumn } from 'typeorm';
import type { RemarkSaid } from '#shared/contracts/remarks.ts';

/** What a listener said beside the trials: beside the record, which carries its leaf. Read by nobody before closing. */
@Entity('remarks')
export class Remark {
  @PrimaryColumn({ type: 'uuid', name: 'session_id' })
  sessionId: string;

  @PrimaryColumn({ type: 'varchar', length: 8 })
  seat: string;

  /** exit, or a break by its number: break/1. */
  @PrimaryColumn({ type: 'varchar', length: 16 })
  about: string;

  @Column({ type: 'json' })
  said: RemarkSaid;

  @Column({ type: 'char', length: 32 })
  salt: string;

  @Column({ type: 'char', length: 64 })
  leaf: string;
}
