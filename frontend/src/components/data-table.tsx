import type { ReactNode } from 'react';

export interface Column<Row> {
  key: string;
  header: string;
  cell: (row: Row) => ReactNode;
  /** Numbers stand at the right. */
  isNumber?: boolean;
  /** Field that the server sorts by; `-field` for descending. */
  sortBy?: string;
  /** Whether the first click sorts from the largest. */
  sortsDescendingFirst?: boolean;
  /** Width from which this column is shown. */
  from?: 'sm' | 'md' | 'lg';
  /** Header for screen readers only, as of a column of buttons. */
  isHeaderHidden?: boolean;
  className?: string;
}

export interface DataTableProps<Row> {
  caption: string;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  sort?: string;
  onSort?: (sort: string) => void;
}

const FROM = { sm: 'max-sm:hidden', md: 'max-md:hidden', lg: 'max-lg:hidden' };

/** A table ruled by hairlines. The first column names the row. */
export function DataTable<Row>({ caption, columns, rows, rowKey, sort, onSort }: DataTableProps<Row>) {
  return (
    <table className="w-full border-collapse text-left">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr className="border-b border-line align-bottom">
          {columns.map((column) => (
            <ColumnHeader key={column.key} column={column} sort={sort} onSort={onSort} />
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={rowKey(row)} className="border-b border-hair align-baseline">
            {columns.map((column, index) => {
              const className = `py-3 pr-5 last:pr-0 ${cellClass(column)}`;
              return index === 0 ? (
                <th key={column.key} scope="row" className={`font-normal ${className}`}>
                  {column.cell(row)}
                </th>
              ) : (
                <td key={column.key} className={className}>
                  {column.cell(row)}
                </td>
              );
            })}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

interface ColumnHeaderProps<Row> {
  column: Column<Row>;
  sort: string | undefined;
  onSort: ((sort: string) => void) | undefined;
}

function ColumnHeader<Row>({ column, sort, onSort }: ColumnHeaderProps<Row>) {
  const { sortBy } = column;
  const direction =
    sort === undefined || sortBy === undefined
      ? null
      : sort === sortBy
        ? 'ascending'
        : sort === `-${sortBy}`
          ? 'descending'
          : null;
  const className = `py-2 pr-5 last:pr-0 text-small font-normal text-muted ${cellClass(column)}`;
  if (sortBy === undefined || !onSort) {
    return (
      <th scope="col" className={className}>
        {column.isHeaderHidden === true ? <span className="sr-only">{column.header}</span> : column.header}
      </th>
    );
  }
  const descendingNext = direction === null ? column.sortsDescendingFirst === true : direction === 'ascending';
  return (
    <th scope="col" aria-sort={direction ?? 'none'} className={className}>
      <button
        type="button"
        onClick={() => onSort(descendingNext ? `-${sortBy}` : sortBy)}
        className={`hover:text-ink ${direction ? 'font-semibold text-ink' : ''}`}
      >
        {column.header}
        <span aria-hidden="true" className={`ml-1 inline-block w-3 ${direction ? '' : 'opacity-0'}`}>
          {direction === 'descending' ? '↓' : '↑'}
        </span>
      </button>
    </th>
  );
}

function cellClass<Row>({ isNumber, from, className = '' }: Column<Row>): string {
  return `${isNumber === true ? 'text-right tabular-nums' : ''} ${from ? FROM[from] : ''} ${className}`;
}
