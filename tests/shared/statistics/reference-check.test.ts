import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { checkFolder } from '../../reference/check-folder.ts';
import { checkPublished } from '../../reference/check-published.ts';
import { checkRecords, type Pending, type ReferenceRecord } from '../../reference/check-records.ts';
import { compare } from '../../reference/compare.ts';
import { mappings } from '../../reference/functions.ts';
import { publishedValues } from '../../reference/published-values.ts';
import { reference } from '../../support/reference.ts';

const folder = new URL('../../fixtures/reference/', import.meta.url).pathname;
const pending = JSON.parse(readFileSync(`${folder}pending.json`, 'utf8')) as Pending;
const nothingPending: Pending = { functions: {}, records: {} };
const records = (file: string) => reference<unknown, ReferenceRecord['expected']>(file) as ReferenceRecord[];
const failuresOf = (list: readonly ReferenceRecord[]) =>
  checkRecords(list, mappings, nothingPending).flatMap(({ failures }) => failures);

describe('every check value of the folder', () => {
  it('agrees with what is computed here, or is named as pending with a reason [T25]', () => {
    const { lines, files, skipped } = checkFolder(folder, pending);
    expect(lines.flatMap(({ failures }) => failures)).toEqual([]);
    expect(skipped).toEqual(['pending.json']);
    expect(files).toBeGreaterThan(20);
    expect(lines.reduce((sum, { cases }) => sum + cases, 0)).toBeGreaterThan(3500);
  });

  it('is a list without a name that no value needs [T25]', () => {
    const { lines } = checkFolder(folder, pending);
    const names = lines.map(({ fn }) => fn);
    const unneeded = Object.keys(pending.functions).filter(
      (name) => !names.includes(name) && !names.some((fn) => name.startsWith(`${fn}.`) || name.startsWith(`${fn} `)),
    );
    expect(unneeded).toEqual([]);
  });
});

describe('a wrong value planted in a copy', () => {
  const runs = records('binomial-tests.json');
  const [first] = runs;
  if (first === undefined) throw new Error('no check values');

  it('is found, by its id and its field [T25]', () => {
    const middle = runs.length >> 1;
    const planted = runs.map((record, index) =>
      index === middle
        ? { ...record, expected: { ...record.expected, pLower: Number(record.expected.pLower) * (1 + 1e-8) } }
        : record,
    );
    expect(failuresOf(runs)).toEqual([]);
    expect(failuresOf(planted)).toEqual([`${runs[middle]?.id} pLower`]);
  });

  it('is found where one count of a table is off by one [T25]', () => {
    const tables = records('critical-values-two-sided.json');
    const planted = tables.map((record, index) =>
      index === 40
        ? { ...record, expected: { minAgreeing: (record.expected.minAgreeing as number[]).map((count) => count + 1) } }
        : record,
    );
    expect(failuresOf(planted)).toEqual([`${tables[40]?.id} minAgreeing`]);
  });

  it('is found among the printed values, whether they agree or not [T25]', () => {
    const check = { topic: 'critical paired', citation: 'ISO 5495', item: 'n=10 alpha=0.05', tol: 0 };
    const failures = (published: number, computed: number, agrees: boolean) =>
      checkPublished([{ ...check, published, computed, agrees }], publishedValues, nothingPending).flatMap(
        (line) => line.failures,
      );
    expect(failures(9, 9, true)).toEqual([]);
    expect(failures(8, 9, false)).toEqual([]);
    expect(failures(8, 9, true)).toHaveLength(1);
    expect(failures(9, 9, false)).toHaveLength(1);
    expect(failures(9, 8, true)).toHaveLength(1);
  });

  it('is not hidden by a function, a field or a value that is not there [T25]', () => {
    expect(failuresOf([{ ...first, fn: 'unheardOf' }])).toEqual(['unheardOf: no function here, and not pending']);
    expect(failuresOf([{ ...first, expected: { ...first.expected, pMiddle: 0.5 } }])).toEqual([`${first.id} pMiddle`]);
    expect(failuresOf([{ ...first, inputs: { k: 2, n: 1, p0: 0.5 } }])[0]).toContain('threw RangeError');
  });

  it('is not hidden by an entry of the pending list that nothing needs [T25]', () => {
    const check = (list: Pending) => checkRecords([first], mappings, list).flatMap(({ failures }) => failures);
    expect(check({ functions: { binomialTest: 'later' }, records: {} })).toEqual([
      'binomialTest is pending and has a function',
    ]);
    expect(check({ functions: {}, records: { [first.id]: 'differs' } })).toEqual([`${first.id} is pending and agrees`]);
  });
});

describe('the pass rule', () => {
  it('is relative for probabilities, has a floor of 1 for logs and limits, and is exact for counts [T25]', () => {
    expect(compare(1.1e-9, 1e-9, 1e-8, 'relative').agrees).toBe(false);
    expect(compare(1.1e-9, 1e-9, 1e-8, 'scaled').agrees).toBe(true);
    expect(compare(1e-11, 0, 1, 'relative').agrees).toBe(false);
    expect(compare(1e-13, 0, 0, 'relative').agrees).toBe(true);
    expect(compare(12.000001, 12, 1, 'exact').agrees).toBe(false);
    expect(compare(Number.NaN, 12, 1, 'scaled').agrees).toBe(false);
    expect(compare(Number.POSITIVE_INFINITY, 'Infinity', 1, 'scaled').agrees).toBe(true);
    expect(compare(0, null, 1, 'scaled').agrees).toBe(false);
    expect(compare([1], [1, 2], 1, 'scaled').agrees).toBe(false);
  });
});
