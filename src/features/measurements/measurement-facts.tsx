import type { Measurement } from '#shared/contracts/measurements.ts';
import { formatDate, formatDateTime, withUnit } from '../../lib/format.ts';
import { type Fact, Facts } from '../../ui/facts.tsx';
import { momentWords } from './measurement-words.ts';

/** With what, by whom, when and how a measurement was taken, and the file it came from. */
export function MeasurementFacts({ measurement, fileHref }: { measurement: Measurement; fileHref: string }) {
  const { instrument, person, takenOn, temperatureC, moment, note, addedAt, file, circuit } = measurement;
  const taken: Fact[] = [
    { label: 'Instrument', value: instrument, isWords: true },
    { label: 'Measured by', value: person, isWords: true },
    { label: 'Date', value: formatDate(`${takenOn}T12:00:00`), isWords: true },
    {
      label: 'Temperature',
      value: temperatureC === null ? 'not noted' : withUnit(String(temperatureC), '°C'),
      isWords: temperatureC === null,
    },
    { label: 'When', value: momentWords[moment], isWords: true },
    ...(circuit === null
      ? []
      : [
          { label: 'Source', value: withUnit(String(circuit.sourceOhms), 'Ω') },
          { label: 'Load', value: withUnit(String(circuit.loadOhms), 'Ω') },
        ]),
    ...(note === '' ? [] : [{ label: 'Note', value: note, isWords: true }]),
    { label: 'Added', value: formatDateTime(addedAt), isWords: true },
  ];
  return (
    <div className="flex flex-col gap-6">
      <Facts title="How it was taken" facts={taken} />
      {file === null ? null : (
        <Facts
          title="The file"
          facts={[
            { label: 'As it came', value: <a href={fileHref}>{file.name}</a>, isWords: true },
            { label: 'Text', value: file.isCorrected ? 'corrected before saving' : 'as in the file', isWords: true },
            { label: 'SHA-256', value: file.digest },
          ]}
        />
      )}
    </div>
  );
}
