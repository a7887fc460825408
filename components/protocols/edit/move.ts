import type { Gap, ProtocolBody } from '@/protocols/types';

const minutesPerUnit = { elapsedHours: 60, localDays: 1440, milkings: 720 } as const;

/** The gap that leads to a visit: the first one whose later end lies in it. Moving the visit changes this gap. */
export function gapInto(body: ProtocolBody, visit: string): Gap | undefined {
  const steps = new Set(body.steps.filter((step) => step.visit === visit).map((step) => step.id));
  return body.gaps.find((gap) => steps.has(gap.to) && !steps.has(gap.from));
}

/** The least a visit can be moved by: an hour for gaps in hours, a day for gaps in days. */
export const moveStepMinutes = (gap: Gap): number => minutesPerUnit[gap.unit];

/**
 * Moves a visit along the line by shifting the gap that leads to it: ideal, least and most go together, so that its
 * window keeps its width. Whole units only; a gap never becomes shorter than one unit. Returns the body unchanged
 * when nothing leads to the visit (the first one).
 */
export function moveVisit(body: ProtocolBody, visit: string, byMinutes: number): ProtocolBody {
  const gap = gapInto(body, visit);
  if (!gap) return body;
  const per = minutesPerUnit[gap.unit];
  const smallest = Math.min(...[gap.least, gap.ideal, gap.most].filter((n) => n !== undefined));
  const by = Math.max(Math.round(byMinutes / per), 1 - smallest);
  if (!Number.isFinite(by) || by === 0) return body;
  const shifted: Gap = {
    ...gap,
    ...(gap.least === undefined ? {} : { least: gap.least + by }),
    ...(gap.ideal === undefined ? {} : { ideal: gap.ideal + by }),
    ...(gap.most === undefined ? {} : { most: gap.most + by }),
  };
  return { ...body, gaps: body.gaps.map((g) => (g.id === gap.id ? shifted : g)) };
}
