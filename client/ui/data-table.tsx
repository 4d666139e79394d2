import type { ReactNode } from 'react';
import { SkeletonBar } from './skeleton.tsx';

export type Column<Row> = {
  readonly key: string;
  /** The heading; also the label beside the value where rows are stacked. */
  readonly header: string;
  readonly cell: (row: Row) => ReactNode;
  readonly align?: 'start' | 'end';
  /** Names the row; one column of a table. */
  readonly rowHeader?: boolean;
  /** The order this column gives, where the list can be sorted by it. */
  readonly sort?: { readonly direction: 'ascending' | 'descending' | 'none'; readonly onSort: () => void };
  /** Leaves out the label where rows are stacked: for values that say what they are. */
  readonly bare?: boolean;
};

type Props<Row> = {
  readonly caption: string;
  /** Shown above the table, or only read out. */
  readonly captionShown?: boolean;
  readonly columns: readonly Column<Row>[];
  /** Null while the first rows are on their way. */
  readonly rows: readonly Row[] | null;
  readonly rowKey: (row: Row) => string;
  /** What stands in place of rows when there are none: nothing on record, or nothing that matches. */
  readonly empty?: ReactNode;
  readonly skeletonRows?: number;
  /** Rows are being replaced: the old ones stay, dimmed. */
  readonly stale?: boolean;
};

/** A ruled table. On a phone each row becomes a small sheet of its own, with the headings as labels. */
export function DataTable<Row>({ caption, captionShown = false, columns, rows, rowKey, empty, skeletonRows = 4, stale = false }: Props<Row>) {
  if (rows !== null && rows.length === 0 && empty !== undefined) return <>{empty}</>;
  return (
    <table role="table" className={`ledger ${stale ? 'is-stale' : ''}`} aria-busy={rows === null || stale}>
      <caption className={captionShown ? 'pb-2 text-left text-[19px] font-semibold' : 'sr-only'}>{caption}</caption>
      <thead role="rowgroup">
        <tr role="row">
          {columns.map((column) => (
            <ColumnHead key={column.key} column={column} />
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup">
        {rows === null
          ? Array.from({ length: skeletonRows }, (_, row) => <SkeletonRow key={row} columns={columns} />)
          : rows.map((row) => (
              <tr role="row" key={rowKey(row)}>
                {columns.map((column) => (
                  <Cell key={column.key} column={column} row={row} />
                ))}
              </tr>
            ))}
      </tbody>
    </table>
  );
}

function ColumnHead<Row>({ column: { header, align, sort } }: { readonly column: Column<Row> }) {
  const sorted = sort === undefined || sort.direction === 'none' ? {} : { 'aria-sort': sort.direction };
  return (
    <th role="columnheader" scope="col" className={align === 'end' ? 'ledger-end' : ''} {...sorted}>
      {sort === undefined ? (
        header
      ) : (
        <button type="button" onClick={sort.onSort} className="inline-flex min-h-11 cursor-pointer items-center gap-1 italic underline decoration-rule underline-offset-4">
          {header}
          {sort.direction !== 'none' && <span aria-hidden="true">{sort.direction === 'ascending' ? '↑' : '↓'}</span>}
        </button>
      )}
    </th>
  );
}

function Cell<Row>({ column, row }: { readonly column: Column<Row>; readonly row: Row }) {
  const { header, cell, align, rowHeader = false, bare = false } = column;
  const content = (
    <>
      {!rowHeader && !bare && (
        <span aria-hidden="true" className="ledger-label">
          {header}
        </span>
      )}
      <span className="ledger-value">{cell(row)}</span>
    </>
  );
  const className = align === 'end' ? 'ledger-end' : '';
  return rowHeader ? (
    <th role="rowheader" scope="row" className={className}>
      {content}
    </th>
  ) : (
    <td role="cell" className={className}>
      {content}
    </td>
  );
}

function SkeletonRow<Row>({ columns }: { readonly columns: readonly Column<Row>[] }) {
  return (
    <tr role="row" aria-hidden="true">
      {columns.map(({ key }) => (
        <td role="cell" key={key}>
          <SkeletonBar width="w-24" />
        </td>
      ))}
    </tr>
  );
}
