import { cableKinds } from '#shared/contracts/cables.ts';
import { conductorMaterials, geometries } from '#shared/contracts/construction.ts';
import { CheckboxField } from '../../ui/checkbox-field.tsx';
import { ListFilter } from '../../ui/list-filter.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { kindWords } from './cable-words.ts';
import type { CableListQuery } from './cables.queries.ts';
import { geometryWords, materialWords } from './construction-words.ts';

type CableFilterProps = {
  query: CableListQuery;
  onChange: (change: { q?: string; archived?: string; kind?: string; material?: string; geometry?: string }) => void;
};

const choices = <Value extends string>(all: string, values: readonly Value[], words: Record<Value, string>) => [
  { value: 'any', label: all },
  ...values.map((value) => ({ value, label: words[value] })),
];

/** Words of name, description or construction, and the fields that narrow the list. */
export function CableFilter({ query, onChange }: CableFilterProps) {
  const chosen = (value: string) => (value === 'any' ? '' : value);
  return (
    <>
      <ListFilter key={query.q} label="Search cables" words={query.q} onSearch={(q) => onChange({ q })}>
        <CheckboxField
          label="Archived ones too"
          checked={query.archived === 'yes'}
          onChange={({ target }) => onChange({ archived: target.checked ? 'yes' : '' })}
        />
      </ListFilter>
      <div className="grid max-w-3xl gap-4 pb-6 sm:grid-cols-3 print:hidden">
        <SelectField
          label="Kind"
          value={query.kind}
          options={choices('Any kind', cableKinds, kindWords)}
          onChange={({ target }) => onChange({ kind: chosen(target.value) })}
        />
        <SelectField
          label="Conductor"
          value={query.material}
          options={choices('Any conductor', conductorMaterials, materialWords)}
          onChange={({ target }) => onChange({ material: chosen(target.value) })}
        />
        <SelectField
          label="Geometry"
          value={query.geometry}
          options={choices('Any geometry', geometries, geometryWords)}
          onChange={({ target }) => onChange({ geometry: chosen(target.value) })}
        />
      </div>
    </>
  );
}
