import { Column, Entity, PrimaryColumn } from 'typeorm';

/** Who measures the levels of a session, where a manager has named somebody; else it is the code holder. */
@Entity('level_duties')
export class LevelDuty {
  @PrimaryColumn({ type: 'uuid', name: 'session_id' })
  sessionId: string;

  @Column({ type: 'uuid', name: 'user_id' })
  userId: string;
}
