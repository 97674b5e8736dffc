import { classNames } from './class-names.ts';
import type { Column, Sort } from './table-column.ts';

type TableHeadProps<Row> = {
  columns: ReadonlyArray<Column<Row>>;
  sort?: Sort;
  onSort?: (sort: Sort) => void;
};

/** Where rows are stacked, only the headers that sort are seen, as a row of buttons. */
export function TableHead<Row>({ columns, sort, onSort }: TableHeadProps<Row>) {
  const isSortable = onSort !== undefined && columns.some((column) => column.isSortable);
  return (
    <thead className={classNames('@2xl:not-sr-only @2xl:table-header-group', isSortable ? 'block' : 'sr-only')}>
      <tr className="flex flex-wrap gap-x-5 border-ink @2xl:table-row @2xl:border-b-2">
        {columns.map((column) => (
          <th
            key={column.key}
            scope="col"
            aria-sort={sort?.key === column.key ? sort.direction : undefined}
            className={classNames(
              'text-left font-semibold @2xl:not-sr-only @2xl:table-cell @2xl:pr-6 @2xl:align-bottom @2xl:last:pr-0',
              column.isSortable && onSort ? '' : 'sr-only @2xl:py-3',
              column.isFigure && '@2xl:text-right',
            )}
          >
            {column.isSortable && onSort ? (
              <SortButton
                header={column.header}
                direction={sort?.key === column.key ? sort.direction : undefined}
                onPress={() => onSort(nextSort(column.key, sort))}
              />
            ) : (
              column.header
            )}
          </th>
        ))}
      </tr>
    </thead>
  );
}

function nextSort(key: string, sort: Sort | undefined): Sort {
  return { key, direction: sort?.key === key && sort.direction === 'ascending' ? 'descending' : 'ascending' };
}

type SortButtonProps = { header: string; direction: Sort['direction'] | undefined; onPress: () => void };

function SortButton({ header, direction, onPress }: SortButtonProps) {
  return (
    <button
      type="button"
      onClick={onPress}
      className="inline-flex min-h-12 cursor-pointer items-center gap-2 rounded font-semibold hover:underline hover:underline-offset-4"
    >
      {header}
      <svg aria-hidden="true" viewBox="0 0 10 16" className="h-4 w-2.5 shrink-0">
        <path d="M5 1 9 6.5H1Z" className={direction === 'ascending' ? 'fill-ink' : 'fill-edge'} />
        <path d="M5 15 1 9.5h8Z" className={direction === 'descending' ? 'fill-ink' : 'fill-edge'} />
      </svg>
    </button>
  );
}
