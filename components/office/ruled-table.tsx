import type { ReactNode } from 'react';
import { Table, Td, Th } from '@/components/ui/table';

export interface RuledColumn {
  key: string;
  head: ReactNode;
  /** Figures of one width, set right. */
  figure?: boolean;
  className?: string;
  sort?: 'ascending' | 'descending';
}

export interface RuledRow {
  key: string;
  id?: string;
  cells: Record<string, ReactNode>;
  className?: string;
}

/** A table from columns and rows; `empty` stands in its place where there are none. */
export function RuledTable({
  caption,
  captionHidden = false,
  aside,
  columns,
  rows,
  empty,
}: {
  caption: string;
  captionHidden?: boolean;
  aside?: ReactNode;
  columns: readonly RuledColumn[];
  rows: readonly RuledRow[];
  empty?: ReactNode;
}) {
  if (rows.length === 0 && empty !== undefined) return <div className="text-body text-pencil">{empty}</div>;
  return (
    <Table caption={caption} captionHidden={captionHidden} aside={aside}>
      <thead>
        <tr>
          {columns.map((column) => (
            <Th key={column.key} figure={column.figure} sort={column.sort} className={column.className}>
              {column.head}
            </Th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.key} id={row.id} className={row.className}>
            {columns.map((column) => (
              <Td key={column.key} figure={column.figure} className={column.className}>
                {row.cells[column.key]}
              </Td>
            ))}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
