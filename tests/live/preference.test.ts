import { execFileSync } from 'node:child_process';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { PreferenceResult } from '#shared/findings/preference-result.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { makeOrganisation, type TestOrganisation } from '../support/people.ts';
import { type Heard, runMethod } from '../support/run-method.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

// A paired preference from its plan to its report, in a group and with one listener; R computes the figures again from the
// codes that were fitted and the answers that were given.

type Choice = 'first' | 'second' | 'none' | null;

/** What R makes of the answers, from the code of the protocol's first cable. */
function fromR(trials: readonly Heard[], firstCable: string) {
  const rows = trials.map(({ codes, choices }) => {
    const of = (choice: Choice) => choices.filter((given) => given === choice).length;
    return `c(${of('first')},${of('second')},${codes[0] === firstCable ? 1 : 2})`;
  });
  const listeners = trials[0]?.choices.map((_, index) => {
    const own = trials.map(({ codes, choices }) => {
      const choice = choices[index] ?? null;
      if (choice === null || choice === 'none') return null;
      return codes[choice === 'first' ? 0 : 1] === firstCable;
    });
    return `c(${own.filter((prefers) => prefers === true).length},${own.filter((prefers) => prefers === false).length})`;
  });
  const script = `
    trials <- list(${rows.join(',')})
    ways <- 1; observed <- 0; mean <- 0
    for (t in trials) {
      longer <- numeric(length(ways) + max(t[1:2]))
      for (place in 1:2) { k <- t[place]; at <- seq_along(ways) + k; longer[at] <- longer[at] + ways / 2 }
      ways <- longer; observed <- observed + t[t[3]]; mean <- mean + sum(t[1:2]) / 2
    }
    values <- seq_along(ways) - 1
    p <- sum(ways[abs(values - mean) >= abs(observed - mean)])
    per <- list(${listeners?.join(',')})
    own <- sapply(per, function(k) if (sum(k) == 0) 1 else binom.test(k[1], sum(k))$p.value)
    side <- sapply(per, function(k) sign(k[1] - k[2]))
    sign_p <- if (any(side != 0)) binom.test(sum(side == 1), sum(side != 0))$p.value else 1
    decided <- sum(sapply(per, sum))
    whole <- binom.test(observed, decided)
    cat(sprintf("%.15g", c(observed, decided, p, sign_p, whole$p.value, whole$conf.int, own, p.adjust(own, "holm"))))
  `;
  const [preferred, decided, p, signP, binomialP, lower, upper, ...own] = execFileSync('Rscript', ['-e', script], {
    encoding: 'utf8',
  })
    .trim()
    .split(' ')
    .map(Number) as [number, number, number, number, number, number, number, ...number[]];
  const half = own.length / 2;
  return { preferred, decided, p, signP, binomialP, lower, upper, own: own.slice(0, half), holm: own.slice(half) };
}

const close = (decimal: string | undefined, value: number) => expect(Number(decimal)).toBeCloseTo(value, 10);

async function runPreference(
  server: TestServer,
  people: TestOrganisation,
  clock: HandClock,
  { settings, ...asked }: { seats: string[]; settings: string[]; choose: Parameters<typeof runMethod>[3]['choose'] },
) {
  const study = { method: 'paired-preference', methodSettings: settings } as const;
  const run = await runMethod(server, people, clock, { ...asked, study, impossible: 'both' });
  return { ...run, result: run.report.result as PreferenceResult };
}

describe('a paired preference from plan to report', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let group: Awaited<ReturnType<typeof runMethod>> & { result: PreferenceResult };
  let alone: Awaited<ReturnType<typeof runMethod>> & { result: PreferenceResult };

  beforeAll(async () => {
    server = await testServer({ clock });
    // Two listeners prefer the lower code, whatever its place; a third follows a habit, states none, or stays silent.
    group = await runPreference(server, await makeOrganisation(server, 'Harbour'), clock, {
      seats: ['left', 'middle', 'right'],
      settings: ['no-preference'],
      choose: ([one = '', other = ''], seat, trial) => {
        if (seat < 2) return one < other ? 'first' : 'second';
        if (trial === 3) return null;
        return trial % 2 === 0 ? 'none' : 'first';
      },
    });
    alone = await runPreference(server, await makeOrganisation(server, 'Elsewhere'), clock, {
      seats: ['middle'],
      settings: [],
      choose: ([one = '', other = ''], _seat, trial) => (trial === 2 || one < other ? 'first' : 'second'),
    });
  }, 120_000);
  afterAll(async () => {
    await server.stop();
  });

  it('verifies, and the sealed analysis is two-sided with silent and undecided answers left out [L3] [F2]', () => {
    for (const { report } of [group, alone])
      expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(group.report.protocol.facts).toEqual(
      expect.arrayContaining([
        { label: 'Method', value: 'Paired preference' },
        { label: 'Test', value: 'exact, two-sided' },
        { label: 'Missing answers', value: 'left out' },
        { label: 'No preference', value: 'offered, left out of the test and stated' },
      ]),
    );
    expect(alone.report.protocol.facts.map(({ label }) => label)).not.toContain('No preference');
  });

  it('presents two cables under places, both of them in every trial [F1]', () => {
    for (const { heard, report, firstCode } of [group, alone]) {
      const both = [...new Set(heard.flatMap(({ codes }) => codes))];
      expect(both).toHaveLength(2);
      for (const { codes } of heard) expect([...codes].sort()).toEqual([...both].sort());
      expect(report.sessions[0]?.trials.map(({ truth }) => truth)).toEqual(
        heard.map(({ codes }) => (codes[0] === firstCode ? 'first' : 'second')),
      );
    }
  });

  it('asks which one is preferred, with “no preference” only where it was registered [F1]', () => {
    expect(group.view?.question).toMatchObject({ text: 'Which do you prefer?' });
    expect(group.view?.question.options.map(({ value }) => value)).toEqual(['first', 'second', 'none']);
    expect(alone.view?.question.options.map(({ value }) => value)).toEqual(['first', 'second']);
    expect(alone.refused).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:invalid-input' } });
  });

  it('reports the figures that R computes of a group’s answers [R1] [F2] [F5]', () => {
    const { result, heard } = group;
    const r = fromR(heard, group.firstCode);
    expect(result).toMatchObject({
      method: 'paired-preference',
      test: 'shared-presentations',
      alternative: 'two-sided',
    });
    expect(result).toMatchObject({
      trials: 8,
      answers: 24,
      missing: 1,
      undecided: 4,
      decided: r.decided,
    });
    expect(result.estimates?.basis).toBe('trials');
    expect(result.preferred).toEqual([r.preferred, r.decided - r.preferred]);
    close(result.p.value, r.p);
    for (const [index, own] of result.byListener.entries()) {
      close(own.p, r.own[index] ?? Number.NaN);
      close(own.holmP, r.holm[index] ?? Number.NaN);
    }
    close(result.majorities.p, r.signP);
    expect(group.report.nullDistribution.reduce((sum, { chance }) => sum + chance, 0)).toBeCloseTo(1, 12);
  });

  it('reports R’s exact two-sided binomial test for one listener, with its interval [R1] [F2]', () => {
    const { result, heard } = alone;
    const r = fromR(heard, alone.firstCode);
    expect(result).toMatchObject({ test: 'exact-binomial', decided: 8, missing: 0, undecided: 0, listeners: 1 });
    expect(result.preferred[0]).toBe(r.preferred);
    close(result.p.value, r.binomialP);
    close(result.estimates?.interval.lower, r.lower);
    close(result.estimates?.interval.upper, r.upper);
  });

  it('finds what the two listeners who agree make of it, in the words of a preference [F6]', () => {
    const { report, result, heard, firstCode } = group;
    const { finding, cables } = report;
    // The draw that was made lies at one end of all 256, whatever the third listener did: p is 2/256.
    expect(result.p).toMatchObject({ numerator: '1', denominator: '128' });
    expect(finding.row).toBe('10');
    const lower = [...(heard[0]?.codes ?? [])].sort()[0];
    expect(finding.headline).toContain(`favoured ${cables[lower === firstCode ? 0 : 1]}`);
    expect(finding.headline).toContain(`by 3 listeners; 4 stated no preference`);
    expect(finding.mustNotSay).toContain('that a difference can be heard: this test does not ask it');
  });
});
