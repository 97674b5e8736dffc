import { execFileSync } from 'node:child_process';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SameDifferentResult } from '#shared/findings/same-different-result.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { makeOrganisation, type TestOrganisation } from '../support/people.ts';
import { repeatableRandom } from '../support/random.ts';
import { type Heard, runMethod } from '../support/run-method.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

// Same-different from its plan to its report, in a group and with one listener; R computes the figures again from the codes
// that were fitted and the answers that were given. R counts every choice of trials one by one.

const isDifferent = ({ codes: [first, second] }: Heard) => first !== second;

/** What R makes of the answers, a missing one taken as wrong. */
function fromR(trials: readonly Heard[]) {
  const kinds = trials.map((trial) => (isDifferent(trial) ? 1 : 0));
  const seats = trials[0]?.choices.length ?? 0;
  const said = Array.from({ length: seats }, (_, seat) =>
    trials.map((trial) => {
      const choice = trial.choices[seat] ?? null;
      if (choice === null) return isDifferent(trial) ? 0 : 1;
      return choice === 'different' ? 1 : 0;
    }),
  );
  const script = `
    different <- c(${kinds.join()}) == 1
    said <- rbind(${said.map((row) => `c(${row.join()})`).join(',')})
    weights <- colSums(said); observed <- sum(weights[different])
    chosen <- combn(length(different), sum(different))
    sums <- apply(chosen, 2, function(trials) sum(weights[trials]))
    own <- apply(said, 1, function(x) fisher.test(
      matrix(c(sum(x[different]), sum(!x[different]), sum(x[!different]), sum(!x[!different])), 2),
      alternative = "greater")$p.value)
    hits <- sum(said[1, different]); n1 <- sum(different); false <- sum(said[1, !different]); n0 <- sum(!different)
    sensitivity <- function(h, f) {
      tau <- if (f == 0) Inf else sqrt(2) * qnorm(1 - f / 2)
      if (h <= f) return(c(0, sqrt(2) * qnorm(1 - (hits + false) / (n1 + n0) / 2)))
      if (h == 1 || f == 0) return(c(Inf, tau))
      c(uniroot(function(d) pnorm((tau - d) / sqrt(2)) - pnorm((-tau - d) / sqrt(2)) - (1 - h), c(0, 30), tol = 1e-12)$root, tau)
    }
    rates <- rbind(binom.test(hits, n1, conf.level = 0.975)$conf.int, binom.test(false, n0, conf.level = 0.975)$conf.int)
    point <- sensitivity(hits / n1, false / n0)
    cat(sprintf("%.15g", c(observed, mean(sums >= observed), point, sensitivity(rates[1, 1], rates[2, 2])[1],
      sensitivity(rates[1, 2], rates[2, 1])[1], own, p.adjust(own, "holm"))))
  `;
  const values = execFileSync('Rscript', ['-e', script], { encoding: 'utf8' }).trim().split(' ');
  const [hits = '', p = '', dPrime = '', criterion = '', lower = '', upper = '', ...own] = values;
  return { hits, p, dPrime, criterion, lower, upper, own: own.slice(0, seats), holm: own.slice(seats) };
}

const close = (decimal: string | undefined, r: string | undefined, digits = 10) =>
  r === 'Inf' ? expect(decimal).toBe('Infinity') : expect(Number(decimal)).toBeCloseTo(Number(r), digits);

describe('same-different from plan to report', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let group: Awaited<ReturnType<typeof run>>;
  let alone: Awaited<ReturnType<typeof run>>;

  async function run(people: TestOrganisation, seats: string[], choose: Parameters<typeof runMethod>[3]['choose']) {
    const study = { method: 'same-different' } as const;
    const ran = await runMethod(server, people, clock, { study, seats, choose, impossible: 'similar' });
    return { ...ran, result: ran.report.result as SameDifferentResult };
  }
  const truly = ([first, second]: string[]) => (first === second ? 'same' : 'different');

  beforeAll(async () => {
    // Eight coins may all fall alike; these do not.
    server = await testServer({ clock, random: repeatableRandom() });
    group = await run(await makeOrganisation(server, 'Harbour'), ['left', 'middle', 'right'], (codes, seat, trial) => {
      if (seat === 0) return truly(codes);
      if (seat === 1) return trial % 3 === 0 ? 'different' : truly(codes);
      return trial === 3 || trial === 4 ? null : 'different';
    });
    alone = await run(await makeOrganisation(server, 'Elsewhere'), ['middle'], (codes, _seat, trial) =>
      trial === 2 ? 'different' : truly(codes),
    );
  }, 120_000);
  afterAll(async () => {
    await server.stop();
  });

  it('verifies, and the sealed analysis counts silence as wrong [L3] [H1]', () => {
    for (const { report } of [group, alone]) {
      expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
      expect(report.protocol.facts).toEqual(
        expect.arrayContaining([
          { label: 'Method', value: 'Same-different' },
          { label: 'Test', value: 'exact, one-sided' },
          { label: 'Missing answers', value: 'counted as wrong' },
        ]),
      );
    }
  });

  it('presents two cables, the same one twice or both, as the draw says [H1]', () => {
    for (const { heard, report, firstCode } of [group, alone])
      expect(report.sessions[0]?.trials.map(({ truth }) => truth)).toEqual(
        heard.map(({ codes }) => codes.map((code) => (code === firstCode ? 'A' : 'B')).join('')),
      );
  });

  it('asks whether they were the same, and takes no third answer [H1]', () => {
    expect(group.view?.question.text).toBe('Were the two the same?');
    expect(group.view?.question.options.map(({ value }) => value)).toEqual(['same', 'different']);
    expect(alone.refused).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:invalid-input' } });
  });

  it('reports the p that R counts over every choice of trials, and each listener’s Fisher test [R1] [H2] [H3]', () => {
    const { result, heard } = group;
    const r = fromR(heard);
    expect(result).toMatchObject({ method: 'same-different', trials: 8, answers: 24, missing: 2 });
    expect(result.estimates?.basis ?? 'trials').toBe('trials');
    expect(result.onDifferent.different).toBe(Number(r.hits));
    close(result.p.value, r.p);
    for (const [index, own] of result.byListener.entries()) {
      close(own.p, r.own[index]);
      close(own.holmP, r.holm[index]);
    }
    expect(group.report.nullDistribution.reduce((sum, { chance }) => sum + chance, 0)).toBeCloseTo(1, 12);
  });

  it('reports R’s Fisher test for one listener, with d′, criterion and limits [R1] [H2] [H5]', () => {
    const { result, heard } = alone;
    const r = fromR(heard);
    close(result.p.value, r.p);
    close(result.p.value, r.own[0]);
    expect(result.estimates === null).toBe(result.differentTrials === 0 || result.differentTrials === result.trials);
    close(result.estimates?.dPrime.dPrime, r.dPrime, 6);
    close(result.estimates?.dPrime.criterion, r.criterion, 6);
    close(result.estimates?.dPrime.lower, r.lower, 6);
    close(result.estimates?.dPrime.upper, r.upper, 6);
  });

  it('never states a percentage of right answers [H4]', () => {
    for (const { report, result } of [group, alone]) {
      expect(result).not.toHaveProperty('correct');
      const said = [report.finding.headline, ...report.finding.modifiers, report.finding.maySay ?? ''].join(' ');
      expect(said).not.toMatch(/% right|% of answers|above guessing:/);
    }
  });
});
