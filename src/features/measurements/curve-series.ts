import type { Cable } from '#shared/contracts/cables.ts';
import type { MeasuredCurve } from '#shared/contracts/measurements.ts';
import { type MeasuredCircuit, predictedQuantity } from '#shared/measurements/predicted-quantity.ts';
import type { Quantity } from '#shared/measurements/quantities.ts';
import type { Point } from '#shared/measurements/read-measurement.ts';
import type { FrequencyPoint, FrequencySeries } from '../../ui/frequency-chart.tsx';

export type Curve = Pick<MeasuredCurve, 'specimen' | 'points' | 'circuit'> & { name: string };

const stepsPerDecade = 20;

const isAtFrequency = (point: Point): point is FrequencyPoint => point.frequency !== null;

/** The points of a measurement that were taken against frequency. */
export const sweptPoints = (points: readonly Point[]): FrequencyPoint[] => points.filter(isAtFrequency);

/**
 * Measured curves of one quantity, and what the construction lets expect over the same frequencies.
 *
 * A level is stated against whatever its instrument took for 0 dB: its prediction is moved to meet the first curve at the
 * frequency nearest to 1 kHz.
 */
export function curveSeries(
  cable: Pick<Cable, 'construction' | 'lengthMm'>,
  quantity: Quantity,
  curves: readonly Curve[],
) {
  const measured: FrequencySeries[] = curves
    .map(({ name, points }) => ({ name, isWorkedOut: false, points: sweptPoints(points) }))
    .filter(({ points }) => points.length > 0);
  const frequencies = [...new Set(measured.flatMap(({ points }) => points.map(({ frequency }) => frequency)))];
  const circuit = curves.find((each) => each.circuit !== null)?.circuit ?? null;
  const predicted = predictedSeries(cable, quantity, frequencies, circuit);
  if (predicted === null) return measured;
  return [...measured, quantity === 'level' ? moved(predicted, measured[0]) : predicted];
}

function predictedSeries(
  { construction, lengthMm }: Pick<Cable, 'construction' | 'lengthMm'>,
  quantity: Quantity,
  frequencies: readonly number[],
  circuit: MeasuredCircuit | null,
): FrequencySeries | null {
  const prediction = predictedQuantity(quantity, construction, lengthMm, circuit);
  if (!prediction.isKnown || frequencies.length === 0) return null;
  const [low, high] = [Math.min(...frequencies), Math.max(...frequencies)];
  const count = Math.ceil(Math.log10(high / low) * stepsPerDecade);
  const between = Array.from({ length: count }, (_, step) => low * 10 ** (step / stepsPerDecade));
  const points = [...new Set([...frequencies, ...between])]
    .filter((frequency) => frequency >= low && frequency <= high)
    .sort((one, other) => one - other)
    .map((frequency) => ({ frequency, value: prediction.value(frequency) }));
  return { name: 'Predicted', isWorkedOut: true, points };
}

function moved(predicted: FrequencySeries, measured: FrequencySeries | undefined): FrequencySeries {
  const meeting = nearestTo(1000, measured?.points ?? []);
  const own = predicted.points.find(({ frequency }) => frequency === meeting?.frequency);
  if (meeting === undefined || own === undefined) return predicted;
  const shift = meeting.value - own.value;
  return { ...predicted, points: predicted.points.map((each) => ({ ...each, value: each.value + shift })) };
}

/** The point nearest to a frequency, by their ratio. */
export function nearestTo(frequency: number, points: readonly FrequencyPoint[]): FrequencyPoint | undefined {
  const distance = (point: FrequencyPoint) => Math.abs(Math.log(point.frequency / frequency));
  return points.reduce<FrequencyPoint | undefined>(
    (best, point) => (best === undefined || distance(point) < distance(best) ? point : best),
    undefined,
  );
}
