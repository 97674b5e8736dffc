import { Column, Entity, Index, PrimaryColumn } from 'typeorm';
import type { SessionState } from '#shared/session/state.ts';

/** A sitting of listeners. What happens in it is on the study's record; these columns serve lists and joining. */
@Entity('sessions')
@Index('sessions_number', ['studyId', 'number'], { unique: true })
export class Session {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Index('sessions_organisation')
  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @Column({ type: 'uuid', name: 'study_id' })
  studyId: string;

  @Column({ type: 'int' })
  number: number;

  @Column({ type: 'uuid', name: 'proctor_id' })
  proctorId: string;

  @Column({ type: 'varchar', length: 60 })
  room: string;

  @Column({ type: 'datetime', precision: 3, name: 'planned_at' })
  plannedAt: Date;

  /** A name of the IANA database: the zone in which mail and calendars tell the time. */
  @Column({ type: 'varchar', length: 64, name: 'time_zone' })
  timeZone: string;

  @Column({ type: 'varchar', length: 16 })
  phase: SessionState['phase'];

  /** What listeners type; only while the session takes them. */
  @Index('sessions_code', { unique: true })
  @Column({ type: 'char', length: 6, nullable: true })
  code: string | null;

  @Column({ type: 'int', name: 'trials_locked' })
  trialsLocked: number;

  @Column({ type: 'int' })
  listeners: number;
}
