import { ListFilter } from '../../ui/list-filter.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import type { MailListQuery } from './mail.queries.ts';

type MailFilterProps = {
  query: MailListQuery;
  onChange: (change: { q?: string; state?: string }) => void;
};

const stateOptions = [
  { value: 'any', label: 'Any state' },
  { value: 'waiting', label: 'Waiting' },
  { value: 'sent', label: 'Sent' },
  { value: 'failed', label: 'Given up' },
  { value: 'kept', label: 'In the mailbox' },
];

export function MailFilter({ query, onChange }: MailFilterProps) {
  return (
    <ListFilter key={query.q} label="Search mail" words={query.q} onSearch={(q) => onChange({ q })}>
      <SelectField
        label="State"
        options={stateOptions}
        value={query.state}
        onChange={({ target }) => onChange({ state: target.value === 'any' ? '' : target.value })}
      />
    </ListFilter>
  );
}
