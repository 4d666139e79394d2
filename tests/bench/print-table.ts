/** Prints rows under their heads, columns in line, figures to the right. */
export function printTable(title: string, heads: readonly string[], rows: readonly (readonly string[])[]): void {
  const widths = heads.map((head, column) => Math.max(head.length, ...rows.map((row) => (row[column] ?? '').length)));
  const line = (cells: readonly string[]): string =>
    cells.map((cell, column) => (column === 0 ? cell.padEnd(widths[column] ?? 0) : cell.padStart(widths[column] ?? 0))).join('  ');
  console.log([`\n${title}`, line(heads), line(widths.map((width) => '-'.repeat(width))), ...rows.map(line)].join('\n'));
}
