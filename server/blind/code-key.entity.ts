import { Column, Entity, PrimaryColumn } from 'typeorm';

/** A study's code key: the first of its two secrets. No other table has a relation to this one. */
@Entity('code_keys')
export class CodeKey {
  @PrimaryColumn({ type: 'uuid', name: 'study_id' })
  studyId: string;

  /** JSON: code, specimen, serial and cable per row. */
  @Column({ type: 'text' })
  rows: string;

  @Column({ type: 'char', length: 64 })
  salt: string;
}
