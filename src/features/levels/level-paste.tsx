import { useState } from 'react';
import type { LevelUnit } from '#shared/levels/level-units.ts';
import { readLevelTable, type TableFault, type TableLine } from '#shared/levels/read-level-table.ts';
import { formatCount } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { type Place, placeKey } from './typed-levels.ts';

type LevelPasteProps = {
  unit: LevelUnit;
  places: readonly Place[];
  onTake: (lines: readonly TableLine[]) => void;
};

/** A table from a spreadsheet or a file. What is understood goes into the lines below; what is not stays here, with why. */
export function LevelPaste({ unit, places, onTake }: LevelPasteProps) {
  const [text, setText] = useState('');
  const [faults, setFaults] = useState<readonly TableFault[]>([]);
  const [taken, setTaken] = useState<number | null>(null);

  function take() {
    const known = new Set(places.map(placeKey));
    const { lines, faults: unread } = readLevelTable(text, unit);
    const fitting = lines.filter((line) => known.has(placeKey(line)));
    const strange = lines
      .filter((line) => !known.has(placeKey(line)))
      .map((line) => ({
        line: 0,
        text: `${line.code}, ${line.channel}, ${line.frequencyHz} Hz is not to be measured here.`,
        content: [line.code, line.channel, line.frequencyHz, ...line.readings].join('\t'),
      }));
    const left = [...unread, ...strange];
    setFaults(left);
    setTaken(fitting.length);
    setText(left.map(({ content }) => content).join('\n'));
    onTake(fitting);
  }

  async function open(file: File | undefined) {
    if (file === undefined) return;
    setTaken(null);
    setFaults([]);
    setText(await file.text());
  }

  return (
    <details className="border-y border-rule py-3">
      <summary className="min-h-8 cursor-pointer font-semibold">Paste a table, or open a file</summary>
      <div className="flex flex-col gap-4 pt-4">
        <TextAreaField
          label="Table"
          rows={6}
          value={text}
          onChange={(event) => setText(event.target.value)}
          hint="Columns: code, channel, frequency, three readings; with or without a first line of names. Tabs, semicolons or commas part them, and decimal commas are read."
        />
        <div className="flex flex-wrap items-center gap-4">
          <Button onClick={take} disabled={text.trim() === ''}>
            Fill in the readings
          </Button>
          <label className="cursor-pointer font-semibold underline underline-offset-4 has-focus-visible:outline-3 has-focus-visible:outline-offset-2">
            Open a CSV file
            <input
              type="file"
              accept=".csv,.tsv,.txt,text/csv,text/plain"
              className="sr-only"
              onChange={({ target }) => {
                void open(target.files?.[0]);
                target.value = '';
              }}
            />
          </label>
        </div>
        <div role="status">
          {taken === null ? null : <p>{formatCount(taken, 'line')} filled in.</p>}
          {faults.length === 0 ? null : (
            <Notice tone="amber" title={`${formatCount(faults.length, 'line is', 'lines are')} left in the box.`}>
              <ul className="list-disc pl-5">
                {faults.map(({ line, text: why, content }) => (
                  <li key={`${line} ${content}`}>{line === 0 ? why : `Line ${line}: ${why}`}</li>
                ))}
              </ul>
            </Notice>
          )}
        </div>
      </div>
    </details>
  );
}
