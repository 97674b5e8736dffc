import { Column, Entity, PrimaryColumn } from 'typeorm';

/**
 * What a single listener asked to hear: beside the record, which carries its leaf from the moment it was asked. Beside
 * the codes that were fitted it would be the key, so nothing reads it for anybody but that phone until closing.
 */
@Entity('presentation_requests')
export class PresentationRequest {
  @PrimaryColumn({ type: 'uuid', name: 'session_id' })
  sessionId: string;

  @PrimaryColumn({ type: 'int' })
  trial: number;

  /** The place of the presentation in its trial, from 0. */
  @PrimaryColumn({ type: 'int' })
  presentation: number;

  @Column({ type: 'varchar', length: 8 })
  seat: string;

  @Column({ type: 'varchar', length: 16 })
  label: string;

  @Column({ type: 'char', length: 32 })
  salt: string;

  @Column({ type: 'char', length: 64 })
  leaf: string;
}
