import { readLoad } from '#shared/measurements/read-load.ts';
import { readTextFile } from '../../lib/read-text-file.ts';
import { FileDrop } from '../../ui/file-drop.tsx';
import { NumberField } from '../../ui/number-field.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import type { CircuitValues, ReadCircuit } from './circuit-values.ts';

type CircuitFieldsProps = {
  values: CircuitValues;
  faults: ReadCircuit['faults'];
  onChange: (values: CircuitValues) => void;
};

/** The source and the load: a resistance, or an impedance curve that is typed or read from a file. */
export function CircuitFields({ values, faults, onChange }: CircuitFieldsProps) {
  const change = (part: Partial<CircuitValues>) => onChange({ ...values, ...part });
  const isCurve = values.loadType === 'curve';
  return (
    <div className="flex max-w-3xl flex-col gap-5">
      <div className="grid gap-x-6 gap-y-5 sm:grid-cols-3">
        <NumberField
          label="Source"
          unit="Ω"
          min={0}
          value={values.sourceOhms}
          onChange={({ target }) => change({ sourceOhms: target.value })}
          error={faults?.source}
        />
        <SelectField
          label="Load"
          value={values.loadType}
          options={[
            { value: 'resistance', label: 'A resistance' },
            { value: 'curve', label: 'An impedance curve' },
          ]}
          onChange={({ target }) => change({ loadType: target.value === 'curve' ? 'curve' : 'resistance' })}
        />
        {isCurve ? null : (
          <NumberField
            label="Its resistance"
            unit="Ω"
            min={0.1}
            value={values.loadOhms}
            onChange={({ target }) => change({ loadOhms: target.value })}
            error={faults?.load}
          />
        )}
      </div>
      {isCurve ? (
        <>
          <FileDrop
            label="Choose a file of the curve"
            accept=".csv,.txt,.tsv,.zma,text/csv,text/plain"
            onFile={async (file) => change({ curve: await readTextFile(file) })}
          />
          <TextAreaField
            label="Impedance of the load"
            rows={6}
            wrap="off"
            spellCheck={false}
            value={values.curve}
            onChange={({ target }) => change({ curve: target.value })}
            error={faults?.curve}
            hint={curveHint(values.curve)}
          />
        </>
      ) : null}
    </div>
  );
}

function curveHint(curve: string): string {
  const how = 'One line for each frequency, such as 20;6,2;12 below a heading such as f/Hz;Z/Ω;phase/°.';
  if (curve.trim() === '' || readLoad(curve).hasPhase) return how;
  return `${how} Without phases it is taken as a resistance that changes with frequency.`;
}
