import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { MailState } from '#shared/contracts/mail.ts';

/** A mail as it was written, in the transaction of the act that it tells of. */
@Entity('outbox')
@Index('outbox_due', ['state', 'nextAttemptAt'])
@Index('outbox_organisation', ['organisationId', 'createdAt'])
export class OutgoingMail {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  /** Null for mail between Fairlead and a person, such as a forgotten password. */
  @Column({ type: 'uuid', name: 'organisation_id', nullable: true })
  organisationId: string | null;

  @Column({ type: 'varchar', length: 200 })
  recipient: string;

  @Column({ type: 'varchar', length: 250 })
  subject: string;

  /** Emptied once the mail is sent: it may hold a link that opens something. */
  @Column({ type: 'mediumtext' })
  text: string;

  @Column({ type: 'mediumtext' })
  html: string;

  /** A calendar file that goes with it (RFC 5546), and its method. Emptied like the text. */
  @Column({ type: 'mediumtext', nullable: true })
  calendar: string | null;

  @Column({ type: 'varchar', length: 16, name: 'calendar_method', nullable: true })
  calendarMethod: 'REQUEST' | 'CANCEL' | null;

  /** The listener whom it is for, so that erasing their address finds it; null for everybody else. */
  @Index('outbox_listener')
  @Column({ type: 'uuid', name: 'listener_id', nullable: true })
  listenerId: string | null;

  @Column({ type: 'varchar', length: 16 })
  state: MailState;

  @Column({ type: 'int' })
  attempts: number;

  @Column({ type: 'varchar', length: 500, name: 'last_error', nullable: true })
  lastError: string | null;

  @Column({ type: 'datetime', precision: 3, name: 'next_attempt_at' })
  nextAttemptAt: Date;

  @Column({ type: 'datetime', precision: 3, name: 'created_at' })
  createdAt: Date;

  @Column({ type: 'datetime', precision: 3, name: 'sent_at', nullable: true })
  sentAt: Date | null;
}
