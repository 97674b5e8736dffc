import { describe, expect, it } from 'vitest';
import { readHertz, readLevelTable } from '#shared/levels/read-level-table.ts';

describe('a table of levels', () => {
  it('is read as it is pasted from a spreadsheet, with decimal commas [S60]', () => {
    const pasted =
      'Code\tChannel\tFrequency\tReading 1 (V)\tReading 2\tReading 3\r\n317\tLeft\t1 kHz\t2,000\t2,001\t1,999\r\n528\tR\t3,15k\t2,010\t2,010\t2,010\r\n';
    expect(readLevelTable(pasted, 'V')).toEqual({
      lines: [
        { code: '317', channel: 'left', frequencyHz: 1000, readings: ['2,000', '2,001', '1,999'] },
        { code: '528', channel: 'right', frequencyHz: 3150, readings: ['2,010', '2,010', '2,010'] },
      ],
      faults: [],
    });
  });

  it('is read without a header, as a file, and with its columns in another order [S60]', () => {
    expect(readLevelTable('\uFEFF317,left,2.0,2.0,2.0\n', 'V').lines[0]?.frequencyHz).toBe(1000);
    expect(readLevelTable('317;mono;1000;2,0;2,0;2,0', 'V').lines[0]?.readings).toEqual(['2,0', '2,0', '2,0']);
    const turned = 'Hz,value 1,value 2,value 3,side,blind code\n1000,-3.1,-3.1,-3.1,left,FL:042';
    expect(readLevelTable(turned, 'dBV').lines).toEqual([
      { code: '042', channel: 'left', frequencyHz: 1000, readings: ['-3.1', '-3.1', '-3.1'] },
    ]);
  });

  it('names each line that it cannot read, and keeps it [S60]', () => {
    const text = [
      '317\tleft\t1000\t2000\t2.001\t1.999',
      '317\t\t1000\t2.0\t2.0\t2.0',
      '317\tup\t1000\t2.0\t2.0\t2.0',
      '317\tright\tloud\t2.0\t2.0\t2.0',
      '528\tleft\t1000\t-3.2 dB\t-3.2\t-3.2',
      '528\tright\t1000\t2.0\t2.0\t',
      'ABC\tright\t1000\t2.0\t2.0\t2.0',
      '',
      '528\tright\t1000\t2.0\t2.0\t2.0',
    ].join('\n');
    const { lines, faults } = readLevelTable(text, 'V');
    expect(lines).toHaveLength(1);
    expect(faults.map(({ line }) => line)).toEqual([1, 2, 3, 4, 5, 6, 7]);
    expect(faults.map(({ text: why }) => why)).toEqual([
      expect.stringContaining('more than 200 V'),
      expect.stringContaining('The channel is missing'),
      expect.stringContaining('“up” is no channel'),
      expect.stringContaining('“loud” is no frequency'),
      expect.stringContaining('is in dB, and this table is in volts'),
      expect.stringContaining('2 readings where 3 are due'),
      expect.stringContaining('no blind code of three digits'),
    ]);
    expect(faults.map(({ content }) => content)).toEqual(text.split('\n').slice(0, 7));
  });

  it('does not take decimal commas for columns [S60]', () => {
    const { lines, faults } = readLevelTable(
      'code,channel,hz,r1 level,r2 level,r3 level\n317,left,1000,2,000,2,001,2,000',
      'V',
    );
    expect(lines).toEqual([]);
    expect(faults[0]?.text).toContain('Where decimals have commas');
    expect(readLevelTable('317,left,1000,2,000,2,001,2,000', 'V').lines).toEqual([]);
  });

  it('reads hertz as people write them [S60]', () => {
    expect(['1 kHz', '315 Hz', '3,15k', '20000', 'fast'].map(readHertz)).toEqual([1000, 315, 3150, 20_000, null]);
  });
});
