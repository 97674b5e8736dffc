import { Column, Entity, PrimaryColumn } from 'typeorm';

/** The token of a signed head, with all that `openssl ts -verify` needs to confirm it. Rows are only ever added. */
@Entity('timestamp_tokens')
export class TimestampToken {
  @PrimaryColumn({ type: 'uuid', name: 'study_id' })
  studyId: string;

  @PrimaryColumn({ type: 'int' })
  sequence: number;

  /** SHA-256 of the statement that was signed. */
  @Column({ type: 'char', length: 64 })
  imprint: string;

  @Column({ type: 'varchar', length: 200 })
  authority: string;

  @Column({ type: 'boolean', name: 'is_local' })
  isLocal: boolean;

  /** What the authority says, ISO 8601. */
  @Column({ type: 'char', length: 24 })
  time: string;

  /** From the signature's time to the token's, in milliseconds; below 0 where the clocks disagree. */
  @Column({ type: 'bigint', name: 'gap_ms', transformer: { to: (ms: number) => ms, from: Number } })
  gapMs: number;

  @Column({ type: 'varchar', length: 80 })
  serial: string;

  @Column({ type: 'int' })
  attempts: number;

  /** The request in DER. */
  @Column({ type: 'blob' })
  request: Buffer;

  /** The reply in DER (TimeStampResp), as it came. */
  @Column({ type: 'mediumblob' })
  reply: Buffer;

  /** Certificates that confirm it, in PEM. */
  @Column({ type: 'mediumtext' })
  certificates: string;

  @Column({ type: 'datetime', precision: 3, name: 'received_at' })
  receivedAt: Date;
}
