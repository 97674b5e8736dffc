import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type MethodId, methodIds } from '#shared/methods/methods.ts';
import { shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { type Asked, blindRun, type Run, type Seeds, secretRemark } from '../support/blind-run.ts';
import { secretTreatment } from '../support/people.ts';

// Where the proctor is told a code: the one to be fitted, and at the labels those in hand and those not found.
const codeAlone = [/"code":"\d{3}"/g, /\d{3} is in hand, and \d{3} is wanted[^"]*/, /Not found: \d{3}(, \d{3})*/];

const firstCodes = ([first]: readonly string[], trials: readonly string[][]) =>
  first === trials[0]?.[0] ? 'as in trial 1' : 'the other way';
const likeTheFirst = ([first, ...others]: readonly string[]) =>
  others.map((code) => (code === first ? 'again' : 'other')).join(' ');

// In ABX the draw is what X is, elsewhere what is heard first, and what is heard again.
const methods: Record<MethodId, Asked> = {
  abx: {
    // With labels scanned at every change: wrong ones, steps taken back, and the inventory.
    study: { method: 'abx', rigPreset: shippedPresets.loudspeaker, changeS: 30 },
    choices: ['A', 'B', 'B', 'A', 'A'],
    drawn: ([a, , x]) => (a === x ? 'A' : 'B'),
  },
  triangle: {
    study: { method: 'triangle' },
    choices: ['first', 'third', 'second', 'first', 'second'],
    drawn: likeTheFirst,
  },
  'duo-trio': {
    study: { method: 'duo-trio' },
    choices: ['first', 'second', 'second', 'first', 'second'],
    drawn: likeTheFirst,
  },
  'same-different': {
    study: { method: 'same-different' },
    choices: ['same', 'different', 'different', 'same', 'same'],
    drawn: likeTheFirst,
  },
  'directional-comparison': {
    study: { method: 'directional-comparison', attribute: 'bass' },
    choices: ['first', 'second', 'second', 'first', 'second'],
    drawn: firstCodes,
  },
  'paired-preference': {
    study: { method: 'paired-preference', methodSettings: ['no-preference'] },
    choices: ['first', 'second', 'none', 'first', 'second'],
    drawn: firstCodes,
  },
};

describe.each(methodIds)('what leaves the server before closing, %s', (id) => {
  const asked = methods[id];
  const seeds: Seeds[] = [
    { codeKey: 'key one', drawSecret: 'draw one' },
    { codeKey: 'key two', drawSecret: 'draw one' },
    { codeKey: 'key one', drawSecret: 'draw two' },
    { codeKey: 'key three', drawSecret: 'draw three' },
  ];
  let runs: Run[] = [];
  beforeAll(async () => {
    runs = [];
    for (const seed of seeds) runs.push(await blindRun(asked, seed));
  }, 120_000);
  afterAll(() => {
    runs = [];
  });

  const other = (index: number): Run => {
    const found = runs[index];
    if (found === undefined) throw new Error(`no run ${index}`);
    return found;
  };

  it('differs in code key and in the draw between the runs, so that the comparison means something [B1]', () => {
    const draws = runs.map(({ codes }) => codes.map((trial) => asked.drawn(trial, codes)).join());
    expect(new Set(draws).size).toBeGreaterThan(1);
    expect(new Set(runs.map(({ codes }) => [...new Set(codes.flat())].sort().join())).size).toBeGreaterThan(1);
  });

  it.each([1, 2, 3])('is the same for listeners, whatever the secrets (run %i) [B1]', (index) => {
    expect(other(index).phones).toEqual(other(0).phones);
    expect(other(0).phones[0]?.length).toBeGreaterThan(40);
  });

  it('has nothing of a cable’s construction for a listener or the proctor, or in a mail [Q7]', () => {
    for (const { phones, proctor, mails } of runs)
      expect([...phones.flat(), ...proctor, ...mails].filter((text) => text.includes(secretTreatment))).toEqual([]);
  });

  it('has nothing of what listeners said beside the trials, for anybody [S115]', () => {
    for (const { phones, proctor, manager, mails } of runs)
      expect(
        [...phones.flat(), ...proctor, ...manager, ...mails].filter((text) => text.includes(secretRemark)),
      ).toEqual([]);
    expect(other(0).proctor.some((text) => text.includes('"exit":{"said":2,"of":2}'))).toBe(true);
  });

  it.each([1, 2, 3])('is the same for managers, whatever the secrets (run %i) [B1]', (index) => {
    expect(other(index).manager).toEqual(other(0).manager);
  });

  it.each([1, 2, 3])('is the same in every mail and calendar file, whatever the secrets (run %i) [B1]', (index) => {
    expect(other(index).mails).toEqual(other(0).mails);
    expect(other(0).mails.some((mail) => mail.includes('BEGIN:VCALENDAR'))).toBe(true);
  });

  it.each([1, 2, 3])('is the same for the proctor but for the code to be fitted (run %i) [B2]', (index) => {
    const withoutCode = (texts: readonly string[]) =>
      texts.map((text) => codeAlone.reduce((left, pattern) => left.replace(pattern, '#'), text));
    expect(withoutCode(other(index).proctor)).toEqual(withoutCode(other(0).proctor));
    expect(other(0).proctor.some((text) => /"code":"\d{3}"/.test(text))).toBe(true);
  });
});

describe('what leaves the server before closing, with X from separate specimens', () => {
  const asked = { ...methods.abx, study: { method: 'abx', separateSpecimens: true } as const };
  const seeds: Seeds = { codeKey: 'key one', drawSecret: 'draw one' };
  const runs: Run[] = [];
  beforeAll(async () => {
    runs.push(await blindRun(asked, seeds));
    runs.push(await blindRun(asked, { ...seeds, isExchanged: true }));
    runs.push(await blindRun(asked, { codeKey: 'key two', drawSecret: 'draw two' }));
  }, 120_000);

  const run = (index: number): Run => {
    const found = runs[index];
    if (found === undefined) throw new Error(`no run ${index}`);
    return found;
  };

  it('has no code twice in a trial, and the sleeves exchanged in some [S41]', () => {
    for (const { codes } of runs) for (const trial of codes) expect(new Set(trial).size).toBe(3);
    expect(run(1).codes).not.toEqual(run(0).codes);
  });

  it('is the same for listeners and managers, whatever the sleeves, the key and the draw [S44] [B1]', () => {
    for (const index of [1, 2]) {
      expect(run(index).phones).toEqual(run(0).phones);
      expect(run(index).manager).toEqual(run(0).manager);
      expect(run(index).mails).toEqual(run(0).mails);
    }
  });

  it('has two codes exchanged for the proctor, and nothing else, when two sleeves are [S44]', () => {
    const [here, there] = [run(0).codes.flat(), run(1).codes.flat()];
    const exchange = new Map(here.map((code, index) => [code, there[index] ?? '']));
    expect(new Set([...exchange].filter(([code, other]) => code !== other).flat()).size).toBe(2);
    const exchanged = run(0).proctor.map((text) =>
      text.replace(/"code":"(\d{3})"/g, (_, code) => `"code":"${exchange.get(code) ?? code}"`),
    );
    expect(run(1).proctor).toEqual(exchanged);
  });
});

describe('what leaves the server before closing, with check trials among the others', () => {
  const asked: Asked = {
    ...methods.abx,
    study: { method: 'abx' },
    ladder: { steps: [{ milliDb: 1000, trials: 2 }], same: 1 },
    choices: ['A', 'B', 'B', 'A', 'A', 'B', 'A', 'B'],
  };
  const runs: Run[] = [];
  beforeAll(async () => {
    for (const drawSecret of ['draw one', 'draw two', 'draw three'])
      runs.push(await blindRun(asked, { codeKey: 'key one', drawSecret }));
    runs.push(await blindRun(asked, { codeKey: 'key two', drawSecret: 'draw one' }));
  }, 120_000);
  const run = (index: number): Run => {
    const found = runs[index];
    if (found === undefined) throw new Error(`no run ${index}`);
    return found;
  };
  /** Of each trial how many codes it took, and which of them come in fewer trials than the reference's. */
  const kinds = ({ codes }: Run) => {
    const trialsWith = (code: string) => codes.filter((trial) => trial.includes(code)).length;
    return codes.map((trial) =>
      new Set(trial).size === 1 ? 'same' : trial.some((code) => trialsWith(code) === 2) ? 'check' : 'main',
    );
  };

  it('has them at other numbers with another draw, so that the comparison means something [S87]', () => {
    for (const one of runs)
      expect(kinds(one).toSorted()).toEqual(['check', 'check', 'main', 'main', 'main', 'main', 'main', 'same']);
    expect(new Set(runs.map((one) => kinds(one).join())).size).toBeGreaterThan(1);
  });

  it.each([1, 2, 3])(
    'is the same for listeners, managers and in mails, whichever trials they are (run %i) [S87] [B1]',
    (index) => {
      expect(run(index).phones).toEqual(run(0).phones);
      expect(run(index).manager).toEqual(run(0).manager);
      expect(run(index).mails).toEqual(run(0).mails);
    },
  );

  it.each([1, 2, 3])('is the same for the proctor but for the code to be fitted (run %i) [S87] [B2]', (index) => {
    const withoutCode = (texts: readonly string[]) => texts.map((text) => text.replace(/"code":"\d{3}"/g, '"code":""'));
    expect(withoutCode(run(index).proctor)).toEqual(withoutCode(run(0).proctor));
  });
});
