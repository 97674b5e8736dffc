import { CheckboxField } from '../../ui/checkbox-field.tsx';
import { ListFilter } from '../../ui/list-filter.tsx';
import type { CableListQuery } from './cables.queries.ts';

type CableFilterProps = {
  query: CableListQuery;
  onChange: (change: { q?: string; archived?: string }) => void;
};

export function CableFilter({ query, onChange }: CableFilterProps) {
  return (
    <ListFilter key={query.q} label="Search cables" words={query.q} onSearch={(q) => onChange({ q })}>
      <CheckboxField
        label="Archived ones too"
        checked={query.archived === 'yes'}
        onChange={({ target }) => onChange({ archived: target.checked ? 'yes' : '' })}
      />
    </ListFilter>
  );
}
