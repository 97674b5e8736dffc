import type { ReactNode } from 'react';
import type { PersonRow } from '#shared/contracts/people.ts';
import { formatDate } from '../../lib/format.ts';
import { roleWords } from '../../lib/role-words.ts';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/table-column.ts';
import { MemberChange } from './member-change.tsx';

type PeopleTableProps = {
  organisationId: string;
  /** Whoever looks; marked in the list. */
  ownId: string;
  rows: readonly PersonRow[];
  sort: string;
  onSort: (word: string) => void;
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  onChanged: (id: string) => void;
};

export function PeopleTable({ organisationId, ownId, onChanged, ...table }: PeopleTableProps) {
  const columns: Column<PersonRow>[] = [
    {
      key: 'name',
      header: 'Name',
      isRowHeader: true,
      isSortable: true,
      cell: ({ id, name, email }) => (
        <>
          {name}
          {id === ownId ? <span className="font-normal text-soft"> (you)</span> : null}
          <span className="block text-base font-normal text-soft [overflow-wrap:anywhere]">{email}</span>
        </>
      ),
    },
    { key: 'role', header: 'Role', isSortable: true, cell: ({ role }) => roleWords[role] },
    { key: 'joined', header: 'Member since', isSortable: true, cell: ({ joinedAt }) => formatDate(joinedAt) },
    {
      key: 'change',
      header: 'Change',
      cell: (person) => (
        <MemberChange organisationId={organisationId} person={person} onChanged={() => onChanged(person.id)} />
      ),
    },
  ];
  return <DataTable caption="Members" columns={columns} rowKey={({ id }) => id} {...table} />;
}
