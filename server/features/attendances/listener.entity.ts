import { Column, Entity, Index, PrimaryColumn } from 'typeorm';

/** A person who is invited to sessions of one study: one address, one label. */
@Entity('listeners')
@Index('listeners_email', ['studyId', 'email'], { unique: true })
@Index('listeners_label', ['studyId', 'label'], { unique: true })
export class Listener {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid', name: 'organisation_id' })
  organisationId: string;

  @Column({ type: 'uuid', name: 'study_id' })
  studyId: string;

  /** The only link to the person. Null once it is erased; the label stays. */
  @Column({ type: 'varchar', length: 200, nullable: true })
  email: string | null;

  /** L01, L02 ... from the first seat on. */
  @Column({ type: 'varchar', length: 8, nullable: true })
  label: string | null;
}
