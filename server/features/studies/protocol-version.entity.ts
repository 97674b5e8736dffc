import { Column, Entity, PrimaryColumn } from 'typeorm';

/** A sealed version of a study's protocol. Rows are only ever added; the study itself keeps the one in force. */
@Entity('protocol_versions')
export class ProtocolVersion {
  @PrimaryColumn({ type: 'uuid', name: 'study_id' })
  studyId: string;

  /** From 1. */
  @PrimaryColumn({ type: 'int' })
  version: number;

  /** The canonical text whose digest is on the record. */
  @Column({ type: 'mediumtext' })
  protocol: string;
}
