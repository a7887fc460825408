/** Places a protocol on one line, to scale: pure geometry, so that it can be tested and printed as well as drawn. */

export interface LineVisit {
  id: string;
  label: string;
  /** Minutes from the first visit: planned, earliest and latest. */
  minutes: number;
  earliest: number;
  latest: number;
  /** Lines of text under the visit's name. */
  lines: { key: string; text: string }[];
}
export interface LineGap {
  id: string;
  from: string;
  to: string;
  label: string;
  /** For a narrow line: `54 h`. */
  short: string;
}
export interface PlacedVisit extends LineVisit {
  x: number;
  /** Window as a thick part of the line; at least as wide as the eye can see. */
  windowX: number;
  windowWidth: number;
  /** Left edge of the text and the row of its top, 0 lowest; rows keep labels from covering each other. */
  textX: number;
  row: number;
  /** Distance of the flag's top above the line. */
  lift: number;
  /** No room at the right: the text stands at the left of its pole. */
  flipped: boolean;
}
export interface PlacedGap extends LineGap {
  x1: number;
  x2: number;
  row: number;
  /** Where the words stand, and whether there is room for them between the ends. */
  textX: number;
  fits: boolean;
}
export interface DayMark {
  x: number;
  day: number;
  labelled: boolean;
}
export interface GapLineLayout {
  width: number;
  /** Room above the line and below it. */
  above: number;
  below: number;
  visits: PlacedVisit[];
  gaps: PlacedGap[];
  days: DayMark[];
}

const margin = 20;
const lineHeight = 24;
const headHeight = 22;
const gapRow = 34;
const charWidth = 7.6;
const minutesPerDay = 1440;

const textWidth = (texts: string[]): number => Math.max(...texts.map((text) => text.length), 4) * charWidth + 34;

/** Lowest row in which [left, right] is free; takes it. */
function takeRow(rows: { left: number; right: number }[][], left: number, right: number): number {
  for (let row = 0; ; row += 1) {
    const taken = (rows[row] ??= []);
    if (taken.every((span) => right <= span.left || left >= span.right)) {
      taken.push({ left, right });
      return row;
    }
  }
}

function placeVisits(visits: LineVisit[], x: (minutes: number) => number, width: number): PlacedVisit[] {
  const placed: PlacedVisit[] = [];
  let ceiling: { left: number; right: number; top: number }[] = [];
  // from the last to the first: a flag that stands on its pole must not cross a later flag's text
  for (const visit of [...visits].sort((a, b) => b.minutes - a.minutes)) {
    const w = textWidth([visit.label, ...visit.lines.map((line) => line.text)]);
    const at = x(visit.minutes);
    const flipped = at + w > width && visit.lines.length > 0;
    const textX = flipped ? Math.max(0, at - w) : at;
    const height = headHeight + visit.lines.length * lineHeight;
    const base = ceiling
      .filter((span) => span.left < textX + w && span.right > textX)
      .reduce((top, span) => Math.max(top, span.top), 14);
    const lift = base + height;
    ceiling = [...ceiling, { left: textX, right: textX + w, top: lift + 6 }];
    const windowX = x(visit.earliest);
    const windowWidth = Math.max(x(visit.latest) - windowX, 6);
    placed.push({ ...visit, x: at, windowX, windowWidth, textX, row: ceiling.length - 1, lift, flipped });
  }
  return placed.reverse();
}

function placeGaps(gaps: LineGap[], visits: PlacedVisit[], width: number): PlacedGap[] {
  const at = new Map(visits.map((visit) => [visit.id, visit.x]));
  const rows: { left: number; right: number }[][] = [];
  return gaps.flatMap((gap) => {
    const from = at.get(gap.from);
    const to = at.get(gap.to);
    if (from === undefined || to === undefined) return [];
    const [x1, x2] = [Math.min(from, to), Math.max(from, to)];
    const words = gap.label.length * charWidth;
    const fits = words + 24 <= x2 - x1;
    const middle = (x1 + x2) / 2;
    const textX = fits ? middle : Math.min(Math.max(middle, words / 2), width - words / 2);
    const left = fits ? x1 : Math.min(x1, textX - words / 2);
    const right = fits ? x2 : Math.max(x2, textX + words / 2);
    return [{ ...gap, x1, x2, fits, textX, row: takeRow(rows, left, right) }];
  });
}

function dayMarks(total: number, x: (minutes: number) => number, pxPerDay: number): DayMark[] {
  const days = Math.ceil(total / minutesPerDay);
  const every = [1, 2, 5, 7, 14].find((n) => n * pxPerDay >= 52) ?? 14;
  return Array.from({ length: days + 1 }, (_, day) => day)
    .filter((day) => x(day * minutesPerDay) <= x(total) + 1)
    .map((day) => ({ x: x(day * minutesPerDay), day, labelled: day % every === 0 }));
}

/**
 * Lays the line out for a width in CSS pixels. The scale is one for the whole line: an hour is as long at the end
 * as at the start. An empty protocol gives an empty line.
 */
export function layoutGapLine(visits: LineVisit[], gaps: LineGap[], width: number): GapLineLayout {
  const total = Math.max(...visits.map((visit) => visit.latest), minutesPerDay);
  const scale = (width - 2 * margin) / total;
  const x = (minutes: number) => margin + minutes * scale;
  const placed = placeVisits(visits, x, width);
  const brackets = placeGaps(gaps, placed, width);
  return {
    width,
    above: Math.max(...placed.map((visit) => visit.lift), 40) + 16,
    below: 40 + (Math.max(...brackets.map((gap) => gap.row), -1) + 1) * gapRow,
    visits: placed,
    gaps: brackets,
    days: dayMarks(total, x, scale * minutesPerDay),
  };
}

/** Minutes at a place on the line, for dragging; never before the first visit. */
export function minutesAt(layout: GapLineLayout, total: number, x: number): number {
  const scale = (layout.width - 2 * margin) / Math.max(total, minutesPerDay);
  return Math.max(0, (x - margin) / scale);
}
