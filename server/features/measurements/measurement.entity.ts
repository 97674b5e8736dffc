import type { Relation } from 'typeorm';
import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn } from 'typeorm';
import type { MeasurementDraft } from '#shared/contracts/measurements.ts';
import type { Quantity } from '#shared/measurements/quantities.ts';
import type { Point } from '#shared/measurements/read-measurement.ts';
import { Specimen } from '../cables/specimen.entity.ts';

/** A measurement of one piece. Nothing of it changes but that it can be struck out, once. */
@Entity('measurements')
@Index('measurements_specimen', ['specimenId', 'quantity', 'takenOn'])
export class Measurement {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid', name: 'specimen_id' })
  specimenId: string;

  @Column({ type: 'varchar', length: 16 })
  quantity: Quantity;

  @Column({ type: 'varchar', length: 200 })
  instrument: string;

  @Column({ type: 'varchar', length: 120 })
  person: string;

  @Column({ type: 'date', name: 'taken_on' })
  takenOn: string;

  @Column({ type: 'double', name: 'temperature_c', nullable: true })
  temperatureC: number | null;

  @Column({ type: 'varchar', length: 8 })
  moment: MeasurementDraft['moment'];

  @Column({ type: 'varchar', length: 500 })
  note: string;

  @Column({ type: 'json', nullable: true })
  circuit: MeasurementDraft['circuit'] | null;

  /** The table as it was typed, or read from the file and corrected. */
  @Column({ type: 'mediumtext' })
  text: string;

  @Column({ type: 'json' })
  columns: MeasurementDraft['columns'];

  /** What the text comes to, in Hz and the quantity's own unit. */
  @Column({ type: 'json' })
  points: Point[];

  @Column({ type: 'int', name: 'point_count' })
  pointCount: number;

  @Column({ type: 'char', length: 64, name: 'file_digest', nullable: true })
  fileDigest: string | null;

  @Column({ type: 'varchar', length: 120, name: 'file_name', nullable: true })
  fileName: string | null;

  @Column({ type: 'boolean', name: 'is_corrected' })
  isCorrected: boolean;

  @Column({ type: 'uuid', name: 'added_by' })
  addedBy: string;

  @Column({ type: 'datetime', precision: 3, name: 'added_at' })
  addedAt: Date;

  @Column({ type: 'datetime', precision: 3, name: 'struck_at', nullable: true })
  struckAt: Date | null;

  @Column({ type: 'varchar', length: 500, name: 'struck_reason', nullable: true })
  struckReason: string | null;

  @ManyToOne(() => Specimen)
  @JoinColumn({ name: 'specimen_id', foreignKeyConstraintName: 'measurements_specimen_fk' })
  specimen: Relation<Specimen>;
}
