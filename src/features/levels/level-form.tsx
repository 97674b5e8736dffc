import { type FormEvent, useState } from 'react';
import type { LevelsPage } from '#shared/contracts/levels.ts';
import { levelFaults, levelQuestions } from '#shared/levels/level-faults.ts';
import { type LevelUnit, levelUnits } from '#shared/levels/level-units.ts';
import { levelCheckWords, type MeasuredLevels } from '#shared/levels/measured-levels.ts';
import type { RegisteredLevels } from '#shared/levels/registered-levels.ts';
import { problemOf } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { CheckboxField } from '../../ui/checkbox-field.tsx';
import { LeaveGuard } from '../../ui/leave-guard.tsx';
import { Notice } from '../../ui/notice.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { LevelGrid } from './level-grid.tsx';
import { LevelOutcome } from './level-outcome.tsx';
import { LevelPaste } from './level-paste.tsx';
import { useRecordLevels } from './levels.queries.ts';
import {
  faultAt,
  instrumentOf,
  measuredSoFar,
  noReadings,
  placeKey,
  placesOf,
  rowsOf,
  type TypedLevels,
} from './typed-levels.ts';

type LevelFormProps = {
  organisationId: string;
  page: LevelsPage & { registered: RegisteredLevels };
  asProctor: boolean;
  onSaved: (check: MeasuredLevels['check']) => void;
};

const unitLabels: Record<LevelUnit, string> = {
  V: 'V (volts; mV behind a reading is read too)',
  dBV: 'dBV',
  dBu: 'dBu',
  dB: 'dB, relative to one reference for the whole session',
};

const capital = (words: string) => `${words.charAt(0).toUpperCase()}${words.slice(1)}`;

/** The latest measurement that whoever measures has taken before: its instrument and unit are usually the same. */
const lastOwn = ({ taken }: LevelsPage) => taken.findLast(({ measured }) => measured !== null)?.measured ?? null;

/** One measurement of every code. What is typed stays until it is on the record. */
export function LevelForm({ organisationId, page, asProctor, onSaved }: LevelFormProps) {
  const { registered, codes, open } = page;
  const known = lastOwn(page);
  const [typed, setTyped] = useState<TypedLevels>({
    check: open[0] ?? 'before',
    unit: known?.unit ?? 'V',
    channels: known?.rows.some(({ channel }) => channel === 'mono') ? 'mono' : 'stereo',
    instrument: {
      name: known?.instrument.name ?? '',
      bandwidth: known === null ? '' : `${known.instrument.bandwidthHz} Hz`,
      calibratedOn: known?.instrument.calibratedOn ?? '',
    },
    readings: {},
  });
  const [isAsked, setAsked] = useState(false);
  const [answered, setAnswered] = useState<readonly string[]>([]);
  const [problems, setProblems] = useState<readonly string[]>([]);
  const record = useRecordLevels(organisationId, page.sessionId);
  const places = placesOf(codes, registered.frequenciesHz, typed.channels);
  const first =
    typed.check === 'before'
      ? null
      : (page.taken.findLast(({ check, measured }) => check === 'before' && measured !== null)?.measured ?? null);
  const { instrument, faults: instrumentFaults } = instrumentOf(typed.instrument);
  const rows = rowsOf(typed, places);
  const isWhole = rows.length === places.length && instrument !== null;
  const measured = isWhole ? { check: typed.check, unit: typed.unit, instrument, rows } : null;
  const questions = isAsked && measured !== null ? levelQuestions(measured, Date.now()) : [];
  const isTyped = Object.values(typed.readings).some((readings) => readings.some((reading) => reading !== ''));

  const change = (part: Partial<TypedLevels>) => setTyped((before) => ({ ...before, ...part }));
  const setInstrument = (part: Partial<TypedLevels['instrument']>) =>
    change({ instrument: { ...typed.instrument, ...part } });

  async function send(event: FormEvent) {
    event.preventDefault();
    setAsked(true);
    setProblems([]);
    if (measured === null) {
      const wrong = places.filter((place) => faultAt(typed.readings[placeKey(place)] ?? noReadings, typed.unit));
      const missing = places.length - rows.length - wrong.length;
      setProblems([
        ...(wrong.length > 0 ? ['Mend the readings that are marked.'] : []),
        ...(missing > 0 ? [`${missing} of ${places.length} lines still lack a reading.`] : []),
        ...(instrument === null ? ['Say what you measure with.'] : []),
      ]);
      return;
    }
    const faults = levelFaults(measured, codes, registered, first);
    if (faults.length > 0) return setProblems(faults.map(({ text }) => text));
    if (levelQuestions(measured, Date.now()).some(({ id }) => !answered.includes(id))) return;
    try {
      await record.mutateAsync({ ...measured, asProctor, answered: [...answered] });
      setTyped((before) => ({ ...before, readings: {} }));
      setAsked(false);
      setAnswered([]);
      onSaved(measured.check);
    } catch (error) {
      const problem = problemOf(error);
      setProblems(problem.errors.length > 0 ? problem.errors.map(({ detail }) => detail) : [problem.message]);
    }
  }

  return (
    <form onSubmit={send} noValidate aria-label="Levels" className="flex flex-col gap-8">
      <LeaveGuard isUnsaved={() => isTyped} />
      <div className="grid gap-x-6 gap-y-6 sm:grid-cols-2 lg:grid-cols-3">
        <SelectField
          label="Measured"
          value={typed.check}
          onChange={(event) => change({ check: event.target.value as TypedLevels['check'] })}
          options={open.map((check) => ({ value: check, label: capital(levelCheckWords[check]) }))}
        />
        <SelectField
          label="Unit"
          value={typed.unit}
          onChange={(event) => change({ unit: event.target.value as LevelUnit })}
          options={levelUnits.map((unit) => ({ value: unit, label: unitLabels[unit] }))}
        />
        <SelectField
          label="Channels"
          value={typed.channels}
          onChange={(event) => change({ channels: event.target.value as TypedLevels['channels'] })}
          options={[
            { value: 'stereo', label: 'Left and right' },
            { value: 'mono', label: 'Mono' },
          ]}
        />
        <TextField
          label="Instrument"
          value={typed.instrument.name}
          maxLength={80}
          onChange={(event) => setInstrument({ name: event.target.value })}
          error={isAsked ? instrumentFaults.name : undefined}
        />
        <TextField
          label="Reads true up to"
          value={typed.instrument.bandwidth}
          onChange={(event) => setInstrument({ bandwidth: event.target.value })}
          hint="Its bandwidth, such as 100 kHz. Many hand-held meters end at 400 Hz."
          error={isAsked ? instrumentFaults.bandwidth : undefined}
        />
        <TextField
          label="Calibrated on"
          type="date"
          optional
          value={typed.instrument.calibratedOn}
          onChange={(event) => setInstrument({ calibratedOn: event.target.value })}
        />
      </div>
      <div className="grid gap-x-14 gap-y-8 lg:grid-cols-[minmax(0,1fr)_20rem] lg:items-start">
        <div className="flex min-w-0 flex-col gap-6">
          <p className="text-soft">
            Play the tone, fit each cable, and read the level at the load three times, the cable unplugged in between.
          </p>
          <LevelPaste
            unit={typed.unit}
            places={places}
            onTake={(lines) =>
              setTyped((before) => ({
                ...before,
                readings: {
                  ...before.readings,
                  ...Object.fromEntries(lines.map((line) => [placeKey(line), line.readings])),
                },
              }))
            }
          />
          <LevelGrid
            typed={typed}
            places={places}
            isAsked={isAsked}
            onType={(place, index, text) =>
              setTyped((before) => ({
                ...before,
                readings: {
                  ...before.readings,
                  [placeKey(place)]: (before.readings[placeKey(place)] ?? noReadings).map((old, at) =>
                    at === index ? text : old,
                  ),
                },
              }))
            }
          />
        </div>
        <div className="lg:sticky lg:top-6">
          <LevelOutcome
            title="What it comes to"
            measured={measuredSoFar(typed, places)}
            first={first}
            registered={registered}
          />
        </div>
      </div>
      {questions.length === 0 ? null : (
        <fieldset className="flex flex-col gap-1 border-l-[5px] border-amber pl-4">
          <legend className="sr-only">Before it goes on the record</legend>
          <p className="font-bold">Look again before it goes on the record:</p>
          {questions.map(({ id, text }) => (
            <CheckboxField
              key={id}
              label={`${text} Yes.`}
              checked={answered.includes(id)}
              onChange={(event) =>
                setAnswered(event.target.checked ? [...answered, id] : answered.filter((other) => other !== id))
              }
            />
          ))}
        </fieldset>
      )}
      <div role="alert" className="empty:hidden">
        {problems.length === 0 ? null : (
          <Notice tone="amber" title="Nothing is saved yet.">
            <ul className="list-disc pl-5">
              {problems.map((problem) => (
                <li key={problem}>{problem}</li>
              ))}
            </ul>
          </Notice>
        )}
      </div>
      <Button type="submit" variant="primary" busy={record.isPending} busyLabel="Recording" className="self-start">
        Put it on the record
      </Button>
    </form>
  );
}
