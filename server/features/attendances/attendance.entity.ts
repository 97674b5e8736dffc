import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { AttendanceState } from '#shared/contracts/attendances.ts';

/** A listener's invitation to one session and what became of it. Its id is the UID of the listener's calendar entry. */
@Entity('attendances')
@Index('attendances_listener', ['sessionId', 'listenerId'], { unique: true })
@Index('attendances_session', ['sessionId', 'position'])
export class Attendance {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @Column({ type: 'uuid', name: 'session_id' })
  sessionId: string;

  @Column({ type: 'uuid', name: 'listener_id' })
  listenerId: string;

  @Column({ type: 'varchar', length: 16 })
  state: AttendanceState;

  /** The order in which seats are given: rises within a session. */
  @Column({ type: 'int' })
  position: number;

  /** SEQUENCE of the last calendar file that was sent; null before the first. */
  @Column({ type: 'int', nullable: true })
  sequence: number | null;

  /** Whether that file put the session into the calendar, rather than taking it out. */
  @Column({ type: 'boolean', name: 'in_calendar' })
  inCalendar: boolean;

  @Column({ type: 'boolean' })
  seated: boolean;

  /** The mail in the outbox that reminds of the session. */
  @Column({ type: 'uuid', name: 'reminder_id', nullable: true })
  reminderId: string | null;

  @Column({ type: 'uuid', name: 'invited_by' })
  invitedBy: string;

  @Column({ type: 'datetime', precision: 3, name: 'invited_at' })
  invitedAt: Date;

  @Column({ type: 'datetime', precision: 3, name: 'answered_at', nullable: true })
  answeredAt: Date | null;
}
