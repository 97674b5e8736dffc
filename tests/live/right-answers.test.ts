import { execFileSync } from 'node:child_process';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import type { ForcedChoiceResult } from '#shared/findings/forced-choice-result.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { makeOrganisation, type TestOrganisation } from '../support/people.ts';
import { type Heard, runMethod } from '../support/run-method.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

// Every method with one right answer from its plan to its report, in a group and with one listener; R computes the figures
// again from the codes that were fitted and the answers that were given.

type Asked = {
  study: Partial<StudyDraft> & { method: ForcedChoiceResult['method'] };
  labels: readonly string[];
  question: string;
  /** The right answer, as whoever fitted the cables could have read it from their codes. */
  right: (codes: readonly string[], firstCode: string) => string;
  /** What the record calls the draw. */
  truth: (codes: readonly string[], firstCode: string) => string;
  /** Rules of deciding as R functions of d′. */
  rules: Record<string, string>;
};

const order = (codes: readonly string[], firstCode: string) =>
  codes.map((code) => (code === firstCode ? 'A' : 'B')).join('');
const odd = (codes: readonly string[]) =>
  codes.findIndex((code) => codes.filter((other) => other === code).length === 1);
const places = ['first', 'second', 'third'];
const byDistance = 'function(d) { a <- pnorm(d / sqrt(2)); b <- pnorm(d / sqrt(6)); a * b + (1 - a) * (1 - b) }';

const methods: Asked[] = [
  {
    study: { method: 'abx' },
    labels: ['A', 'B'],
    question: 'Which one did X match?',
    right: ([a, , x]) => (x === a ? 'A' : 'B'),
    truth: ([a, , x]) => (x === a ? 'A' : 'B'),
    rules: {
      differencing: byDistance,
      independent: 'function(d) { a <- pnorm(d / sqrt(2)); b <- pnorm(d / 2); a * b + (1 - a) * (1 - b) }',
    },
  },
  {
    study: { method: 'triangle' },
    labels: places,
    question: 'Which one was the odd one?',
    right: (codes) => places[odd(codes)] ?? '',
    truth: order,
    rules: {
      differencing:
        'function(d) 2 * integrate(function(z) (pnorm(-z * sqrt(3) + d * sqrt(2 / 3)) + pnorm(-z * sqrt(3) - d * sqrt(2 / 3))) * dnorm(z), 0, 12, rel.tol = 1e-11, subdivisions = 500)$value',
    },
  },
  {
    study: { method: 'duo-trio' },
    labels: ['first', 'second'],
    question: 'Which one was the same as R?',
    right: ([reference, first]) => (reference === first ? 'first' : 'second'),
    truth: order,
    rules: { differencing: byDistance },
  },
  {
    study: { method: 'directional-comparison', attribute: 'bass' },
    labels: ['first', 'second'],
    question: 'Which one had more bass?',
    right: ([first], firstCode) => (first === firstCode ? 'first' : 'second'),
    truth: ([first], firstCode) => (first === firstCode ? 'first' : 'second'),
    rules: { 'more-of-it': 'function(d) pnorm(d / sqrt(2))' },
  },
];

/** What R makes of the answers. */
function fromR({ labels, right, rules }: Asked, trials: readonly Heard[], firstCode: string) {
  const rows = trials.map(({ codes, choices }) => {
    const counts = labels.map((label) => choices.filter((choice) => choice === label).length);
    const missing = choices.filter((choice) => choice === null).length;
    return `list(n = c(${counts.join()}), right = ${labels.indexOf(right(codes, firstCode)) + 1}, missing = ${missing})`;
  });
  const seats = trials[0]?.choices.length ?? 0;
  const own = Array.from({ length: seats }, (_, seat) => {
    const correct = trials.filter(({ codes, choices }) => choices[seat] === right(codes, firstCode)).length;
    return `c(${correct}, ${trials.length})`;
  });
  const script = `
    trials <- list(${rows.join(',')}); m <- ${labels.length}
    ways <- 1; observed <- 0
    for (t in trials) {
      longer <- numeric(length(ways) + max(t$n))
      for (k in t$n) { at <- seq_along(ways) + k; longer[at] <- longer[at] + ways / m }
      ways <- longer; observed <- observed + t$n[t$right]
    }
    p <- sum(ways[seq_along(ways) - 1 >= observed])
    own <- sapply(list(${own.join(',')}), function(k) binom.test(k[1], k[2], 1 / m, "greater")$p.value)
    answers <- ${trials.length * seats}
    whole <- binom.test(observed, answers, 1 / m, "greater")$p.value
    limits <- binom.test(observed, answers)$conf.int
    inverse <- function(rate, pc) if (pc <= 1 / m) 0 else if (pc == 1) Inf else
      uniroot(function(d) rate(d) - pc, c(0, 12), tol = 1e-12)$root
    rules <- list(${Object.values(rules).join(',')})
    d <- unlist(lapply(rules, function(rate) sapply(c(observed / answers, limits), function(pc) inverse(rate, pc))))
    n <- length(trials)
    over <- function(of) { rate <- sum(of) / answers; spread <- sqrt(n / (n - 1) * sum((of - rate * answers / n)^2)) / answers
      rate + c(-1, 1) * qt(.975, n - 1) * spread }
    fit <- sapply(trials, function(t) t$n[t$right]); gone <- sapply(trials, function(t) t$missing)
    panel <- c(max(0, over(fit)[1]), min(1, over(fit + gone)[2]))
    cat(sprintf("%.15g", c(observed, p, whole, limits, panel, own, p.adjust(own, "holm"), d)))
  `;
  const values = execFileSync('Rscript', ['-e', script], { encoding: 'utf8' }).trim().split(' ').map(Number);
  const [correct = Number.NaN, p = Number.NaN, binomialP = Number.NaN, lower, upper, low, high, ...rest] = values;
  return {
    ...{ correct, p, binomialP, lower, upper, panel: [low, high] },
    own: rest.slice(0, seats),
    holm: rest.slice(seats, 2 * seats),
    dPrime: rest.slice(2 * seats),
  };
}

const close = (decimal: string | undefined, value: number | undefined, digits = 10) =>
  expect(Number(decimal)).toBeCloseTo(value ?? Number.NaN, digits);

describe.each(methods.map((asked) => [asked.study.method, asked] as const))('%s from plan to report', (_id, asked) => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  const method = methodOf(asked.study.method);
  const wrongOf = (label: string) => asked.labels[(asked.labels.indexOf(label) + 1) % asked.labels.length] ?? '';
  let server: TestServer;
  let group: Awaited<ReturnType<typeof run>>;
  let alone: Awaited<ReturnType<typeof run>>;

  async function run(people: TestOrganisation, seats: string[], choose: Parameters<typeof runMethod>[3]['choose']) {
    const ran = await runMethod(server, people, clock, { study: asked.study, seats, choose, impossible: 'neither' });
    return { ...ran, result: ran.report.result as ForcedChoiceResult };
  }

  beforeAll(async () => {
    server = await testServer({ clock });
    // Somebody who hears it can tell which code is which: that is all that these listeners go by.
    const lowest = (codes: string[]) => [...codes].sort()[0] ?? '';
    group = await run(await makeOrganisation(server, 'Harbour'), ['left', 'middle', 'right'], (codes, seat, trial) => {
      const right = asked.right(codes, lowest(codes));
      if (seat === 0) return right;
      if (seat === 1) return trial % 3 === 0 ? wrongOf(right) : right;
      return trial === 3 ? null : (asked.labels[0] ?? '');
    });
    alone = await run(await makeOrganisation(server, 'Elsewhere'), ['middle'], (codes, _seat, trial) => {
      const right = asked.right(codes, lowest(codes));
      return trial === 2 ? wrongOf(right) : right;
    });
  }, 180_000);
  afterAll(async () => {
    await server.stop();
  });

  it('verifies, and the sealed analysis is one-sided with silence counted as wrong [L3] [C1]', () => {
    for (const { report } of [group, alone]) {
      expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
      expect(report.protocol.facts).toEqual(
        expect.arrayContaining([
          { label: 'Method', value: method.name },
          { label: 'Test', value: 'exact, one-sided' },
          { label: 'Missing answers', value: 'counted as wrong' },
        ]),
      );
    }
  });

  it('presents what the draw says, and the report names it [C1]', () => {
    for (const { heard, report, firstCode } of [group, alone]) {
      expect(report.sessions[0]?.trials.map(({ truth }) => truth)).toEqual(
        heard.map(({ codes }) => asked.truth(codes, firstCode)),
      );
      for (const { codes } of heard) expect(codes).toHaveLength(method.presentations.length);
    }
  });

  it('asks its own question, and takes no answer that it does not have [C1]', () => {
    expect(group.view?.question.text).toBe(asked.question);
    expect(group.view?.question.options.map(({ value }) => value)).toEqual(asked.labels);
    expect(alone.refused).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:invalid-input' } });
  });

  it('reports the figures that R computes of a group’s answers [R1] [C2]', () => {
    const { result, heard } = group;
    const r = fromR(asked, heard, group.firstCode);
    expect(result).toMatchObject({
      method: asked.study.method,
      test: 'shared-presentations',
      chance: { numerator: 1, denominator: asked.labels.length },
      trials: 8,
      answers: 24,
      missing: 1,
      correct: r.correct,
      estimates: { basis: 'trials' },
    });
    close(result.p.value, r.p);
    close(result.estimates?.interval.lower, r.panel[0]);
    close(result.estimates?.interval.upper, r.panel[1]);
    for (const [index, own] of result.byListener.entries()) {
      close(own.p, r.own[index]);
      close(own.holmP, r.holm[index]);
    }
    expect(group.report.nullDistribution.reduce((sum, { chance }) => sum + chance, 0)).toBeCloseTo(1, 12);
  });

  it('reports R’s exact binomial test for one listener, with d′ by the method’s own function [R1] [C2] [C3]', () => {
    const { result, heard } = alone;
    const r = fromR(asked, heard, alone.firstCode);
    expect(result).toMatchObject({ test: 'exact-binomial', answers: 8, missing: 0, listeners: 1, correct: r.correct });
    close(result.p.value, r.binomialP);
    close(result.estimates?.interval.lower, r.lower);
    close(result.estimates?.interval.upper, r.upper);
    for (const [index, name] of Object.keys(asked.rules).entries()) {
      const reading = result.estimates?.dPrime[name];
      const [dPrime, lower, upper] = r.dPrime.slice(3 * index, 3 * index + 3);
      close(reading?.dPrime, dPrime, 6);
      close(reading?.lower, lower, 6);
      close(reading?.upper, upper, 6);
    }
  });

  it('comes to a headline of the one table [T8]', () => {
    for (const { report, result } of [group, alone]) {
      const row = result.isBelowGuessing ? '1' : result.isSignificant ? '2' : '5';
      expect(report.finding.row).toBe(row);
      expect(methodOf(result.method).portray(result, report.cables).figures[0]?.value).toBe(
        `${result.correct} / ${result.answers}`,
      );
    }
  });
});
