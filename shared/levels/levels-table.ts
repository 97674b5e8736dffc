import type { Table, TableField } from '../bundle/tables.ts';
import type { StudyReading } from '../ledger/study-reading.ts';
import { levelMilliDb } from './level-units.ts';
import { levelsInRecord } from './levels-in-record.ts';

const field = (name: string, type: TableField['type'], description: string): TableField => ({
  name,
  type,
  description,
});

/** Every reading of level on the record; no table where none was taken, so that bundles from before still compare. */
export function levelsTables(study: StudyReading): Table[] {
  const recorded = levelsInRecord(study.entries());
  if (recorded.length === 0) return [];
  const cables = study.protocol().cables;
  const cableOf = new Map(
    study.secrets().codeKey.rows.map(({ code, cable }) => [code, cables[cable === 0 ? 0 : 1].name]),
  );
  return [
    {
      name: 'levels',
      title: 'Every measurement of level at the load, by blind code',
      fields: [
        field('session', 'integer', 'Number of the session in the study, from 1.'),
        field('check', 'string', 'When it was measured: before, half-time or after.'),
        field('measured', 'datetime', 'When it was recorded, by the server’s clock.'),
        field('code', 'string', 'Blind code on the sleeve.'),
        field('cable', 'string', 'The cable that the code stands for.'),
        field('channel', 'string', 'left, right or mono.'),
        field('frequency_hz', 'integer', 'Frequency of the test signal.'),
        field('unit', 'string', 'What was read off: V, dBV, dBu, or dB relative to one reference.'),
        field('reading_1', 'integer', 'First reading: millionths of a volt, or thousandths of a decibel.'),
        field('reading_2', 'integer', 'Second reading.'),
        field('reading_3', 'integer', 'Third reading.'),
        field(
          'level_mdb',
          'integer',
          'What the readings come to in thousandths of a decibel, relative to 1 V or the reference.',
        ),
        field('instrument', 'string', 'What it was measured with.'),
        field('bandwidth_hz', 'integer', 'Up to where the instrument reads true.'),
        field('calibrated_on', 'string', 'Its last calibration; empty where nobody knew.'),
      ],
      key: ['session', 'check', 'measured', 'code', 'channel', 'frequency_hz'],
      rows: recorded.flatMap(({ session, check, at, unit, instrument, rows }) =>
        rows.map(({ code, channel, frequencyHz, readings }) => [
          session,
          check,
          at,
          code,
          cableOf.get(code) ?? '',
          channel,
          frequencyHz,
          unit,
          ...readings,
          levelMilliDb(readings, unit),
          instrument.name,
          instrument.bandwidthHz,
          instrument.calibratedOn ?? '',
        ]),
      ),
    },
  ];
}
