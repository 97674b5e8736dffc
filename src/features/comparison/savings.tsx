import type { Circuit } from '#shared/cables/level-difference.ts';
import { savingsOf } from '#shared/cables/savings.ts';
import type { Cable } from '#shared/contracts/cables.ts';
import { formatNumber, withUnit } from '../../lib/format.ts';

const levelFace = (levelDb: number) => `${levelDb < 0 ? '−' : ''}${Math.abs(levelDb).toFixed(3)}`;

/** What a cable loses by its resistance, and what a larger cross-section or silver would save of it. */
export function Savings({ cable, circuit }: { cable: Cable; circuit: Circuit }) {
  const variants = savingsOf(cable.construction, cable.lengthMm, circuit);
  if (!variants.isKnown) return null;
  const lost = variants.value[0]?.levelDb ?? 0;
  return (
    <div className="min-w-0">
      <table className="w-full border-collapse">
        <caption className="pb-2 text-left">
          <span className="font-bold">{cable.name}</span>: level lost to resistance at 1 kHz, and what would save some
          of it
        </caption>
        <thead>
          <tr className="border-b-2 border-ink align-bottom">
            <th scope="col" className="py-2 pr-4 text-left">
              If it were
            </th>
            <th scope="col" className="py-2 pr-4 text-right">
              Loop
            </th>
            <th scope="col" className="py-2 pr-4 text-right">
              Lost
            </th>
            <th scope="col" className="py-2 text-right">
              Saved
            </th>
          </tr>
        </thead>
        <tbody>
          {variants.value.map(({ name, ohms, levelDb }) => (
            <tr key={name} className="border-b border-rule">
              <th scope="row" className="py-2 pr-4 text-left font-normal">
                {name}
              </th>
              <td className="py-2 pr-4 text-right font-mono whitespace-nowrap">
                {withUnit(formatNumber(ohms * 1000, 1), 'mΩ')}
              </td>
              <td className="py-2 pr-4 text-right font-mono whitespace-nowrap">{withUnit(levelFace(levelDb), 'dB')}</td>
              <td className="py-2 text-right font-mono whitespace-nowrap">
                {name === 'as it is' ? '' : withUnit((levelDb - lost).toFixed(3), 'dB')}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <details>
        <summary className="inline-flex min-h-8 cursor-pointer items-center rounded underline underline-offset-4 hover:decoration-2">
          How<span className="sr-only">: what is saved by {cable.name}</span>
        </summary>
        <p>
          R = ρ / A for the loop; the level is that of source, cable and load in series at 1 kHz, against a cable
          without resistance.
        </p>
        <p className="text-soft">IEC 60028 (1925); silver 1.59e-8 Ω m at 20 °C, from memory.</p>
      </details>
    </div>
  );
}
