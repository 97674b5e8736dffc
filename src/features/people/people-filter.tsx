import { roles } from '#shared/contracts/endpoint.ts';
import { roleWords } from '../../lib/role-words.ts';
import { ListFilter } from '../../ui/list-filter.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import type { PeopleListQuery } from './people.queries.ts';

type PeopleFilterProps = {
  query: PeopleListQuery;
  onChange: (change: { q?: string; role?: string }) => void;
};

const roleOptions = [
  { value: 'any', label: 'Any role' },
  ...roles.map((role) => ({ value: role, label: roleWords[role] })),
];

export function PeopleFilter({ query, onChange }: PeopleFilterProps) {
  return (
    <ListFilter key={query.q} label="Search members" words={query.q} onSearch={(q) => onChange({ q })}>
      <SelectField
        label="Role"
        options={roleOptions}
        value={query.role}
        onChange={({ target }) => onChange({ role: target.value === 'any' ? '' : target.value })}
      />
    </ListFilter>
  );
}
