import { useState } from 'react';
import type { Cable } from '#shared/contracts/cables.ts';
import type { MeasuredCurve } from '#shared/contracts/measurements.ts';
import { predictedQuantity } from '#shared/measurements/predicted-quantity.ts';
import { quantities } from '#shared/measurements/quantities.ts';
import { FrequencyChart } from '../../ui/frequency-chart.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { curveSeries, nearestTo, sweptPoints } from './curve-series.ts';
import { figureOf, figureWithUnit, quantityUnit, quantityWords } from './measurement-words.ts';

type MeasuredCurvesProps = { cable: Cable; curves: readonly MeasuredCurve[] };

/** What was measured last on each piece, one piece over the other and over the prediction. */
export function MeasuredCurves({ cable, curves }: MeasuredCurvesProps) {
  const measured = quantities.filter((quantity) => curves.some((curve) => curve.quantity === quantity));
  const [wanted, setWanted] = useState(measured[0]);
  const quantity = measured.find((each) => each === wanted) ?? measured[0];
  if (quantity === undefined) return null;
  const own = curves
    .filter((curve) => curve.quantity === quantity)
    .map((curve) => ({ ...curve, name: curve.specimen.serial }));
  const series = curveSeries(cable, quantity, own);
  const words = quantityWords[quantity];
  return (
    <div className="flex flex-col gap-6">
      {measured.length > 1 ? (
        <SelectField
          label="Show"
          className="max-w-xs"
          value={quantity}
          options={measured.map((value) => ({ value, label: quantityWords[value] }))}
          onChange={({ target }) => setWanted(quantities.find((each) => each === target.value))}
        />
      ) : null}
      {series.some(({ isWorkedOut }) => !isWorkedOut) ? (
        <FrequencyChart
          caption={`${words} of each piece, and as predicted`}
          quantity={`${words}, ${quantityUnit(quantity)}`}
          series={series}
          format={(value) => figureOf(quantity, value)}
        />
      ) : null}
      <PieceFigures cable={cable} quantity={quantity} curves={own} />
    </div>
  );
}

type PieceFiguresProps = { cable: Cable; quantity: (typeof quantities)[number]; curves: readonly MeasuredCurve[] };

/** One figure for each piece, beside the prediction: the value, or that nearest to 1 kHz. */
function PieceFigures({ cable, quantity, curves }: PieceFiguresProps) {
  const rows = curves.flatMap(({ id, specimen, circuit, points }) => {
    const point = nearestTo(1000, sweptPoints(points)) ?? points[0];
    if (point === undefined) return [];
    const prediction = predictedQuantity(quantity, cable.construction, cable.lengthMm, circuit);
    const isComparable = prediction.isKnown && quantity !== 'level';
    const predicted = isComparable ? prediction.value(point.frequency ?? 0) : null;
    return [{ id, serial: specimen.serial, value: point.value, predicted }];
  });
  return (
    <table className="w-full max-w-2xl border-collapse">
      <caption className="pb-2 text-left text-soft">
        {quantityWords[quantity]} of each piece, nearest to 1 kHz where there are several values
      </caption>
      <thead>
        <tr className="border-b-2 border-ink">
          <th scope="col" className="py-2 pr-4 text-left">
            Piece
          </th>
          <th scope="col" className="py-2 pr-4 text-right">
            Measured
          </th>
          <th scope="col" className="py-2 pr-4 text-right">
            Predicted
          </th>
          <th scope="col" className="py-2 text-right">
            Off by
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ id, serial, value, predicted }) => (
          <tr key={id} className="border-b border-rule font-mono">
            <th scope="row" className="py-2 pr-4 text-left font-normal [overflow-wrap:anywhere]">
              {serial}
            </th>
            <td className="py-2 pr-4 text-right whitespace-nowrap">{figureWithUnit(quantity, value)}</td>
            <td className="py-2 pr-4 text-right whitespace-nowrap">
              {predicted === null ? 'not known' : figureWithUnit(quantity, predicted)}
            </td>
            <td className="py-2 text-right whitespace-nowrap">
              {predicted === null || predicted === 0 ? '' : percentOff(value / predicted - 1)}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

const percentOff = (share: number) => `${share < 0 ? '−' : '+'}${Math.abs(share * 100).toFixed(1)}\u00a0%`;
