import { conductorResistance } from '#shared/cables/dc-resistance.ts';
import { resistivityFromIacs } from '#shared/cables/resistivity.ts';
import { skinEffect } from '#shared/cables/round-wire.ts';
import { skinDepth } from '#shared/cables/skin-depth.ts';
import { areaOfDiameter, diameterOfGauge } from '#shared/cables/wire-gauge.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { clopperPearson } from '#shared/statistics/clopper-pearson.ts';
import { criticalCount } from '#shared/statistics/critical-count.ts';
import { fisherExactTest } from '#shared/statistics/fisher-exact.ts';
import { midPInterval } from '#shared/statistics/mid-p-interval.ts';
import { wilsonInterval } from '#shared/statistics/wilson.ts';
import type { PublishedValue } from './check-published.ts';

const numbersOf = (item: string): number[] => (item.match(/\d*\.?\d+/g) ?? []).map(Number);

const smallestRight: PublishedValue = ({ item, topic }) => {
  const [trials = 0, alpha = 0] = numbersOf(item);
  const chance = topic.endsWith('triangle') ? { numerator: 1, denominator: 3 } : evenChance;
  return criticalCount(trials, chance, alpha)?.count ?? null;
};

/** The chance of a false alarm and of a miss, when `right` are asked for. */
const risk: PublishedValue = ({ item }) => {
  const [trials = 0, first = 0, second = 0.5, third = 0] = numbersOf(item);
  // One item names the level before the rate and the number to reach last.
  const [right, rate] = item.includes('critical r=') ? [third, second] : [first, second];
  return item.includes('type II')
    ? binomialTest(right - 1, trials, rate, 'less').p
    : binomialTest(right, trials, evenChance, 'greater').p;
};

/** Mendel's peas, where an item says no more than "p". */
const twoSided: PublishedValue = ({ item }) => {
  const [successes = 0, trials = 0, numerator = 1, denominator = 2] = numbersOf(item === 'p' ? '682/925 3/4' : item);
  return binomialTest(successes, trials, { numerator, denominator }, 'two-sided').p;
};

const intervalOf = (item: string) =>
  item.includes('Wilson') ? wilsonInterval : item.includes('mid-P') ? midPInterval : clopperPearson;

/** Where an item names no side, the limit nearer to the printed one. */
const limit: PublishedValue = ({ item, published }) => {
  const [successes = 0, trials = 0] = numbersOf(item);
  const { lower, upper } = intervalOf(item)(successes, trials, 0.95);
  const isLower = /(lo|lower|hi|upper)$/.test(item)
    ? /lo(wer)?$/.test(item)
    : Math.abs(lower - Number(published)) < Math.abs(upper - Number(published));
  return isLower ? lower : upper;
};

const annealedCopper = resistivityFromIacs(100, 20, 0.00393);

/** An item names radius over skin depth, or x, which is sqrt(2) of that. */
const skinRatio: PublishedValue = ({ item }) => {
  const [value = 0] = numbersOf(item.replace(/^.*?=/, ''));
  return skinEffect(item.includes('a/delta') ? value * Math.SQRT2 : value).resistanceRatio;
};

/** In mm; one table names its own resistivity. */
const depth: PublishedValue = ({ item, citation }) => {
  const [frequency = 0] = numbersOf(item);
  return skinDepth(citation.includes('1.7e-8') ? 1.7e-8 : annealedCopper, frequency) * 1000;
};

/** In thousandths of an inch where it is a diameter, else in ohm per km or per 100 ft. */
const wireTable: PublishedValue = ({ item, citation }) => {
  const diameter = diameterOfGauge(Number(/AWG (-?\d+)/.exec(item)?.[1]));
  if (item.endsWith('mil')) return diameter / 25.4e-6;
  const metres = citation.includes('100 ft') ? 30.48 : 1000;
  return conductorResistance(annealedCopper, areaOfDiameter(diameter)) * metres;
};

/** The items of each topic of the printed values, in terms of the functions of shared/. */
export const publishedValues: { readonly [topic: string]: PublishedValue } = {
  'typeI/II': risk,
  'critical triangle': smallestRight,
  'critical duo-trio': smallestRight,
  'critical paired': smallestRight,
  'Clopper-Pearson': limit,
  intervals: limit,
  'exact two-sided': twoSided,
  'skin effect': skinRatio,
  'skin depth': depth,
  AWG: wireTable,
  // Eight cups, four of each, all told right.
  randomisation: () =>
    fisherExactTest(
      [
        [4, 0],
        [0, 4],
      ],
      'greater',
    ).p,
};
