import type { ReactNode } from 'react';
import type { useFieldWiring } from './field-wiring.ts';

type FieldNotesProps = { wiring: ReturnType<typeof useFieldWiring>; hint?: ReactNode };

export function FieldNotes({ wiring, hint }: FieldNotesProps) {
  return (
    <>
      {wiring.fault ? (
        <p id={wiring.ids.fault} className="border-l-4 border-amber pl-2.5 font-semibold text-amber">
          {wiring.fault}
        </p>
      ) : null}
      {hint ? (
        <p id={wiring.ids.hint} className="text-soft">
          {hint}
        </p>
      ) : null}
    </>
  );
}
