import type { ReadRow } from './rows';
import type { Problem } from './types';

/** Lines that hold the same value, by value: one entry for each value that stands more than once. */
function linesBy(rows: readonly ReadRow[], valueOf: (row: ReadRow) => string | undefined): Map<string, number[]> {
  const lines = new Map<string, number[]>();
  for (const row of rows) {
    const value = valueOf(row);
    if (!value) continue;
    const on = lines.get(value);
    if (on) on.push(row.line);
    else lines.set(value, [row.line]);
  }
  return new Map([...lines].filter(([, on]) => on.length > 1));
}

/** Lines named in one sentence: a file that repeats one tag a thousand times needs no thousand numbers. */
const mostLinesSaid = 5;

/**
 * Identities that the file gives more than once, by line. Every such row is refused: which of them is right, only the
 * yards know. Tags that differ in capitals alone are the same tag.
 */
export function findRepeats(rows: readonly ReadRow[]): Map<number, Problem[]> {
  const found = new Map<number, Problem[]>();
  const say = (line: number, problem: Problem) => found.set(line, [...(found.get(line) ?? []), problem]);
  const others = (lines: number[], own: number) => {
    const near = lines.slice(0, mostLinesSaid + 1).filter((line) => line !== own);
    return [...near.slice(0, mostLinesSaid).map(String), ...(lines.length - 1 > mostLinesSaid ? ['…'] : [])];
  };
  for (const [, lines] of linesBy(rows, (row) => row.tag.toLowerCase())) {
    for (const line of lines) {
      say(line, { field: 'tag', key: 'server.import.tagTwice', params: { lines: others(lines, line) } });
    }
  }
  for (const [, lines] of linesBy(rows, (row) => row.values.eid)) {
    for (const line of lines) {
      say(line, { field: 'eid', key: 'server.import.eidTwice', params: { lines: others(lines, line) } });
    }
  }
  return found;
}
