import { ListFilter } from '../../ui/list-filter.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import type { SessionListQuery } from './sessions.queries.ts';

type SessionFilterProps = {
  query: SessionListQuery;
  onChange: (change: { q?: string; phase?: string }) => void;
};

const phaseOptions = [
  { value: 'any', label: 'Any phase' },
  { value: 'open', label: 'Planned or running' },
  { value: 'ended', label: 'Ended' },
];

export function SessionFilter({ query, onChange }: SessionFilterProps) {
  return (
    <ListFilter key={query.q} label="Search sessions" words={query.q} onSearch={(q) => onChange({ q })}>
      <SelectField
        label="Phase"
        options={phaseOptions}
        value={query.phase}
        onChange={({ target }) => onChange({ phase: target.value === 'any' ? '' : target.value })}
      />
    </ListFilter>
  );
}
