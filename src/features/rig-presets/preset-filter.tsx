import { CheckboxField } from '../../ui/checkbox-field.tsx';
import { ListFilter } from '../../ui/list-filter.tsx';
import type { PresetListQuery } from './rig-presets.queries.ts';

type PresetFilterProps = {
  query: PresetListQuery;
  onChange: (change: { q?: string; archived?: string }) => void;
};

export function PresetFilter({ query, onChange }: PresetFilterProps) {
  return (
    <ListFilter key={query.q} label="Search rig presets" words={query.q} onSearch={(q) => onChange({ q })}>
      <CheckboxField
        label="Archived ones too"
        checked={query.archived === 'yes'}
        onChange={({ target }) => onChange({ archived: target.checked ? 'yes' : '' })}
      />
    </ListFilter>
  );
}
