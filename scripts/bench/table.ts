/** One measurement; `ratio` is what carries over to another machine. */
export interface Row {
  what: string;
  value: number;
  unit: string;
  ratio?: number;
  /** What the ratio is beside. */
  beside?: string;
}

const short = (value: number) => (value >= 100 ? value.toFixed(0) : value.toPrecision(3));

export function printTable(rows: readonly Row[]): void {
  const width = Math.max(...rows.map(({ what }) => what.length));
  for (const { what, value, unit, ratio, beside } of rows) {
    const tail = ratio === undefined ? '' : `${short(ratio).padStart(8)} of ${beside ?? ''}`;
    console.log(`  ${what.padEnd(width)} ${short(value).padStart(9)} ${unit.padEnd(4)}${tail}`);
  }
}
