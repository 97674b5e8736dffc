import type { CuePicture } from '#shared/cue-audit/portrayed-cue-audit.ts';
import { StripChart } from '../../ui/strip-chart.tsx';

/** What a found cue looked like: its values on either side, or the courses that went with one another. */
export function CuePictureFigure({ picture }: { picture: CuePicture }) {
  if (picture.kind === 'values') return <StripChart quantity={picture.quantity} rows={picture.sides} />;
  return (
    <div className="overflow-x-auto">
      <table className="border-collapse">
        <caption className="sr-only">Trial by trial</caption>
        <tbody>
          {picture.rows.map(({ label, marks }) => (
            <tr key={label}>
              <th scope="row" className="pr-4 text-left font-semibold whitespace-nowrap">
                {label}
              </th>
              <td className="font-mono whitespace-nowrap">{marks.join(' ')}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
