import type { ReactNode } from 'react';

export type Column<Row> = {
  key: string;
  header: ReactNode;
  /** Numbers stand right, in Plex Mono, so that their digits line up. */
  numeric?: boolean;
  /** The row's heading: usually its first column. */
  rowHeader?: boolean;
  cell: (row: Row) => ReactNode;
  className?: string;
};

type TableProps<Row> = {
  /** Says what the table holds; hidden from sight when a heading above already does. */
  caption: string;
  captionHidden?: boolean;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
};

/** A table that scrolls inside its own frame on a narrow screen. */
export function Table<Row>({
  caption,
  captionHidden = false,
  columns,
  rows,
  rowKey,
}: TableProps<Row>) {
  return (
    <div
      role="region"
      aria-label={caption}
      tabIndex={0}
      className="overflow-x-auto rounded-panel border border-line bg-sheet"
    >
      <table className="w-full border-collapse text-left text-[0.9375rem]">
        <caption
          className={
            captionHidden ? 'sr-only' : 'px-4 pt-3 pb-1 text-left text-small font-medium text-ink-2'
          }
        >
          {caption}
        </caption>
        <thead>
          <tr className="border-b border-line">
            {columns.map((column) => (
              <th
                key={column.key}
                scope="col"
                className={`px-4 py-2.5 text-small font-medium whitespace-nowrap text-ink-2 ${column.numeric ? 'text-right' : ''} ${column.className ?? ''}`}
              >
                {column.header}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={rowKey(row)} className="border-b border-line last:border-0 hover:bg-paper">
              {columns.map((column) => {
                const className = `px-4 py-2.5 align-middle ${column.numeric ? 'figures text-right whitespace-nowrap' : ''} ${column.className ?? ''}`;
                return column.rowHeader ? (
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
    </div>
  );
}
