import { useState } from 'react';
import { useFormContext } from 'react-hook-form';
import { differenceWords } from '#shared/cables/difference-words.ts';
import { levelDifference } from '#shared/cables/level-difference.ts';
import { predictedLine } from '#shared/cables/predicted-line.ts';
import type { Cable } from '#shared/contracts/cables.ts';
import { NumberField } from '../../../ui/number-field.tsx';
import type { StudyFormValues } from './study-form-values.ts';

const usualLoadOhms = 8;

/** What the constructions of the two chosen cables let expect, into a resistance; nothing where either is not known. */
export function PredictedDifference({ cables }: { cables: readonly Cable[] }) {
  const { watch } = useFormContext<StudyFormValues>();
  const [typed, setTyped] = useState(String(usualLoadOhms));
  const [first, second] = [0, 1].map((index) => {
    const chosen = cables.find(({ id }) => id === watch(`cables.${index as 0 | 1}.cableId`));
    if (chosen === undefined) return undefined;
    const line = predictedLine(chosen.construction, chosen.lengthMm);
    return line.isKnown ? line.value : undefined;
  });
  // Pieces of one cable differ in nothing that its construction tells.
  const isOneCable = watch('cables.0.cableId') === watch('cables.1.cableId');
  if (first === undefined || second === undefined || isOneCable) return null;
  const load = Number(typed);
  const isSound = typed.trim() !== '' && load >= 0.1 && load <= 1_000_000;
  return (
    <div className="flex flex-col gap-4 border-t border-rule pt-4">
      <NumberField
        label="Load for the prediction"
        unit="Ω"
        min={0.1}
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        hint="A resistance, fed by a source without one. It is not part of the study."
        error={isSound ? undefined : 'From 0.1 Ω to 1 MΩ'}
        className="max-w-xs"
      />
      <p role="status">
        {isSound
          ? differenceWords(
              levelDifference(first, second, { sourceOhms: 0, load: { type: 'resistor', resistance: load } }),
            )
          : null}
      </p>
    </div>
  );
}
