import type { Row } from './row';

const heads = ['work', 'measured', 'peer', 'ratio', 'target', 'reached'] as const;

const cells = (row: Row): string[] => [
  row.work,
  row.measured,
  row.peer,
  row.ratio,
  row.target,
  row.reached === null ? '' : row.reached ? 'yes' : 'no',
];

/** Prints the rows under each other, every column as wide as its widest cell. */
export function printTable(rows: readonly Row[]): void {
  const table = [[...heads], ...rows.map(cells)];
  const widths = heads.map((_, column) => Math.max(...table.map((line) => line[column]?.length ?? 0)));
  const print = (line: readonly string[]) =>
    console.log(
      line
        .map((cell, column) => cell.padEnd(widths[column] ?? 0))
        .join(' | ')
        .trimEnd(),
    );
  const [head = [], ...body] = table;
  print(head);
  print(widths.map((width) => '-'.repeat(width)));
  body.forEach(print);
}
