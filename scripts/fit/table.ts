/** Columns of text aligned under their heads: words to the left, figures to the right. */
export function table(heads: string[], rows: string[][]): string {
  const all = [heads, ...rows];
  const widths = heads.map((_, i) => Math.max(...all.map((row) => (row[i] ?? '').length)));
  const isFigure = heads.map((_, i) => rows.every((row) => /^-?[\d.x %]*$/.test(row[i] ?? '')));
  return all
    .map((row) =>
      row
        .map((cell, i) => (isFigure[i] ? cell.padStart(widths[i]!) : cell.padEnd(widths[i]!)))
        .join('  ')
        .trimEnd(),
    )
    .join('\n');
}
