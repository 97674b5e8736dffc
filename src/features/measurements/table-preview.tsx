import { unitsOf } from '#shared/measurements/quantities.ts';
import { readMeasurement } from '#shared/measurements/read-measurement.ts';
import { readTable } from '#shared/measurements/read-table.ts';
import { formatCount } from '../../lib/format.ts';
import { hertzFace } from '../../ui/frequency-chart.tsx';
import { Notice } from '../../ui/notice.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { columnsOf, type MeasurementValues } from './measurement-values.ts';
import { figureWithUnit, quantityWords } from './measurement-words.ts';

type TablePreviewProps = {
  values: Pick<MeasurementValues, 'text' | 'quantity' | 'chosen'>;
  onChoose: (chosen: MeasurementValues['chosen']) => void;
  /** Puts the cursor into a line of the text. */
  onLine: (line: number) => void;
};

const separatorWords = { tab: 'tabs', semicolon: 'semicolons', comma: 'commas', space: 'blanks' };
const mostFaults = 12;
const mostRows = 6;

/** How the text is understood, before anything is saved: columns, units, first values, and every line that is not. */
export function TablePreview({ values, onChoose, onLine }: TablePreviewProps) {
  const { text, quantity, chosen } = values;
  if (text.trim() === '') return null;
  const table = readTable(text);
  const columns = columnsOf(values);
  const { points, faults } = readMeasurement(text, quantity, columns);
  const names = table.columns.map(({ name, unit }, index) => ({
    value: String(index),
    label: `${index + 1}${name === '' ? '' : `: ${name}`}${unit === '' ? '' : ` (${unit})`}`,
  }));
  const units = (what: typeof quantity | 'frequency') =>
    unitsOf[what].map(({ name }) => ({ value: name, label: name }));
  const choose = (change: MeasurementValues['chosen']) => onChoose({ ...chosen, ...change });

  return (
    <section aria-label="How it is understood" className="flex flex-col gap-5 border-t-2 border-ink pt-4">
      <div>
        <h2 className="pb-1 text-xl">How it is understood</h2>
        <p className="text-soft">
          {table.columns.length === 1
            ? 'One column'
            : `${table.columns.length} columns, parted by ${separatorWords[table.separator]}`}
          ; decimal {table.decimal === ',' ? 'comma' : 'point'}.
        </p>
      </div>
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-[minmax(0,1fr)_8rem]">
        <SelectField
          label="Column of the frequency"
          value={columns.frequency === null ? 'none' : String(columns.frequency)}
          options={[{ value: 'none', label: 'None: not taken against frequency' }, ...names]}
          onChange={({ target }) => choose({ frequency: target.value === 'none' ? null : Number(target.value) })}
        />
        <SelectField
          label="Its unit"
          value={columns.frequencyUnit}
          disabled={columns.frequency === null}
          options={units('frequency')}
          onChange={({ target }) => choose({ frequencyUnit: target.value })}
        />
        <SelectField
          label={`Column of the ${quantityWords[quantity].toLowerCase()}`}
          value={String(columns.value)}
          options={names}
          onChange={({ target }) => choose({ value: Number(target.value) })}
        />
        <SelectField
          label="Unit of the values"
          value={columns.valueUnit}
          options={units(quantity)}
          onChange={({ target }) => choose({ valueUnit: target.value })}
        />
      </div>
      <div role="status" className="flex flex-col gap-4">
        {faults.length > 0 ? (
          <Notice
            tone="amber"
            title={faults.length === 1 ? 'One line cannot be read.' : `${faults.length} lines cannot be read.`}
          >
            Correct them in the text above; the file stays as it is.
            <ul className="pt-1">
              {faults.slice(0, mostFaults).map(({ line, detail }) => (
                <li key={`${line} ${detail}`}>
                  <button
                    type="button"
                    onClick={() => onLine(line)}
                    className="min-h-8 cursor-pointer font-semibold underline underline-offset-4 hover:decoration-2"
                  >
                    Line {line}
                  </button>
                  : {detail}
                </li>
              ))}
              {faults.length > mostFaults ? <li>and {faults.length - mostFaults} more</li> : null}
            </ul>
          </Notice>
        ) : null}
        {points.length === 0 ? null : (
          <p>
            {formatCount(points.length, 'value')} can be read; the first:{' '}
            <span className="font-mono">
              {points
                .slice(0, mostRows)
                .map(
                  ({ frequency, value }) =>
                    `${figureWithUnit(quantity, value)}${frequency === null ? '' : ` at ${hertzFace(frequency)}`}`,
                )
                .join(' · ')}
            </span>
          </p>
        )}
      </div>
    </section>
  );
}
