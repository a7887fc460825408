/** First id of the form `base`, `base2`, `base3` ... that is not taken. Ids are letters and figures only. */
export function freeId(base: string, taken: Iterable<string>): string {
  const used = new Set(taken);
  const clean = base.replace(/[^A-Za-z0-9_-]/g, '') || 'x';
  if (!used.has(clean)) return clean;
  for (let n = 2; ; n += 1) {
    if (!used.has(`${clean}${n}`)) return `${clean}${n}`;
  }
}
