import { studyStates } from '#shared/contracts/studies.ts';
import { ListFilter } from '../../../ui/list-filter.tsx';
import { SelectField } from '../../../ui/select-field.tsx';
import type { StudyListQuery } from '../studies.queries.ts';
import { stateWords } from '../study-words.ts';

type StudyFilterProps = {
  query: StudyListQuery;
  onChange: (change: { q: string } | { state: string }) => void;
};

const stateOptions = [
  { value: 'any', label: 'Any state' },
  ...studyStates.map((state) => ({ value: state, label: stateWords[state].word })),
];

export function StudyFilter({ query, onChange }: StudyFilterProps) {
  return (
    <ListFilter key={query.q} label="Search titles" words={query.q} onSearch={(q) => onChange({ q })}>
      <SelectField
        label="State"
        options={stateOptions}
        value={query.state}
        onChange={({ target }) => onChange({ state: target.value === 'any' ? '' : target.value })}
      />
    </ListFilter>
  );
}
