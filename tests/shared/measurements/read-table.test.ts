import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { unitNamed } from '#shared/measurements/quantities.ts';
import { chooseColumns, readMeasurement } from '#shared/measurements/read-measurement.ts';
import { readTable } from '#shared/measurements/read-table.ts';

const valuesOf = (text: string) => readTable(text).rows.map(({ values }) => values);

describe('reading a table of measurements', () => {
  const cases: [string, string, number[][]][] = [
    [
      'semicolons and decimal commas',
      '20;0,1\n1000;0,25\n',
      [
        [20, 0.1],
        [1000, 0.25],
      ],
    ],
    [
      'commas and decimal points',
      '20,0.1\r\n1000,0.25',
      [
        [20, 0.1],
        [1000, 0.25],
      ],
    ],
    [
      'tabs and decimal commas',
      '20\t0,1\n1000\t0,25',
      [
        [20, 0.1],
        [1000, 0.25],
      ],
    ],
    [
      'blanks and decimal commas',
      '20,5   0,1\n1000,5   0,25',
      [
        [20.5, 0.1],
        [1000.5, 0.25],
      ],
    ],
    [
      'powers of ten and a typographer’s minus',
      '1e3;−2.5E-3\n2E3;−3',
      [
        [1000, -0.0025],
        [2000, -3],
      ],
    ],
    ['a byte order mark, comments and a heading', '\ufeff# taken cold\nf (Hz);R (mΩ)\n\n20;41,3\n% end', [[20, 41.3]]],
    [
      'quotes and a separator at the end',
      '"20";"0,1";\n"40";"0,2";',
      [
        [20, 0.1],
        [40, 0.2],
      ],
    ],
    ['one value', '41,3', [[41.3]]],
    ['repeated values below a heading', 'R / mΩ\n41,3\n41,5', [[41.3], [41.5]]],
    [
      'whole numbers between commas',
      'f,R\n20,41\n50,42',
      [
        [20, 41],
        [50, 42],
      ],
    ],
    ['lines of an instrument before the heading', 'Meter 7;S/N 12\nFrequency [kHz];C [pF]\n1;300', [[1, 300]]],
  ];
  for (const [name, text, values] of cases)
    it(`understands ${name} [Q16]`, () => {
      expect(valuesOf(text)).toEqual(values);
      expect(readTable(text).faults).toEqual([]);
    });

  it('names every broken line, and says what is wrong with it [Q16]', () => {
    const text = 'f/Hz;R/mΩ\n20;41,3\n50;4l,3\n100;\n1.000,5;41,4\n200;41,5';
    expect(readTable(text).faults).toEqual([
      { line: 3, detail: '“4l,3” is not a number' },
      { line: 4, detail: '2 values are needed here, and there is 1' },
      { line: 5, detail: '“1.000,5” is not clear: write it without separators of thousands' },
    ]);
    expect(valuesOf(text)).toEqual([
      [20, 41.3],
      [200, 41.5],
    ]);
  });

  it('counts a broken first line among the values, not as a heading [Q16]', () => {
    expect(readTable('20;x\n30;1,5').faults).toEqual([{ line: 1, detail: '“x” is not a number' }]);
  });

  it('finds columns and units by the heading, in any of its spellings [Q16]', () => {
    for (const heading of ['f/kHz;L/uH', 'Frequency [kHz];Inductance [µH]', 'freq in khz;Ls (μH)', 'kHz;µH'])
      expect(chooseColumns(readTable(`${heading}\n1;0,9`), 'inductance'), heading).toEqual({
        frequency: 0,
        value: 1,
        frequencyUnit: 'kHz',
        valueUnit: 'µH',
      });
    const swapped = chooseColumns(readTable('R (mOhm)\tphase\tFrequency (Hz)\n41\t0.2\t20'), 'resistance');
    expect(swapped).toEqual({ frequency: 2, value: 0, frequencyUnit: 'Hz', valueUnit: 'mΩ' });
    expect(chooseColumns(readTable('41,3'), 'resistance').frequency).toBeNull();
  });

  it('tells milli from mega, and refuses a unit of another quantity', () => {
    expect(unitNamed('frequency', 'MHz')?.factor).toBe(1e6);
    expect(unitNamed('resistance', 'mOhm')?.factor).toBe(1e-3);
    expect(unitNamed('inductance', 'pF')).toBeUndefined();
  });

  it('gives values in Hz and in the unit of the quantity, by frequency [Q16]', () => {
    const text = 'f/kHz;R/mΩ\n20;45,6\n1;41,3';
    const choice = chooseColumns(readTable(text), 'resistance');
    expect(readMeasurement(text, 'resistance', choice)).toEqual({
      points: [
        { frequency: 1000, value: 0.0413 },
        { frequency: 20_000, value: 0.0456 },
      ],
      faults: [],
    });
  });

  it('refuses what no cable has, at its line [Q16]', () => {
    const choice = { frequency: 0, value: 1, frequencyUnit: 'Hz', valueUnit: 'F' };
    expect(readMeasurement('0;1e-10\n20;300', 'capacitance', choice).faults).toEqual([
      { line: 1, detail: 'A frequency is above 0 and at most 1 GHz' },
      { line: 2, detail: 'This is larger than any cable has: look at the unit' },
    ]);
    expect(readMeasurement('only words', 'capacitance', choice).faults).toEqual([
      { line: 1, detail: 'There is no line of numbers' },
    ]);
    expect(readMeasurement('20;1', 'capacitance', { ...choice, value: 2 }).faults).toEqual([
      { line: 1, detail: 'The chosen column has no value here' },
    ]);
  });

  it('reads back whatever is written in one of its manners [Q16]', () => {
    const cell = fc.double({ min: 0.001, max: 99_999, noNaN: true }).map((value) => Number(value.toPrecision(6)));
    const rows = fc.array(fc.tuple(cell, cell), { minLength: 2, maxLength: 12 });
    const manner = fc.constantFrom(
      [';', ','],
      [';', '.'],
      ['\t', ','],
      ['\t', '.'],
      [', ', '.'],
      ['  ', ','],
      ['  ', '.'],
    );
    fc.assert(
      fc.property(rows, manner, (table, [separator = '', decimal = '']) => {
        const text = table
          .map((row) => row.map((value) => String(value).replace('.', decimal)).join(separator))
          .join('\n');
        expect(valuesOf(text)).toEqual(table);
      }),
      { numRuns: 200 },
    );
  });

  it('never throws, whatever it is given', () => {
    fc.assert(
      fc.property(
        fc
          .array(fc.constantFrom(...'0123456789,;.\t\n\r\ufeff#"−eE+ RΩ[]()/\u0000'), { maxLength: 80 })
          .map((signs) => signs.join('')),
        (text) => {
          const { rows, faults } = readTable(text);
          for (const { line } of [...rows, ...faults]) expect(line).toBeGreaterThan(0);
        },
      ),
      { numRuns: 60 },
    );
  });
});
