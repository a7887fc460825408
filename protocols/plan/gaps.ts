import type { Gap } from '../types';

/** Minutes of one unit without any date: days of 24 hours, two milkings a day. */
export const minutesPerUnit = { elapsedHours: 60, localDays: 1440, milkings: 720 } as const;

/** What a gap aims at, in its own unit: its ideal, else the middle of its bounds, else the one bound it has. */
export function idealOf(gap: Gap): number {
  if (gap.ideal !== undefined) return gap.ideal;
  if (gap.least !== undefined && gap.most !== undefined) return (gap.least + gap.most) / 2;
  return gap.least ?? gap.most ?? 0;
}

/**
 * A gap as minutes without any date: days of 24 hours, two milkings a day. For checking a protocol and drawing it;
 * dated plans use the clocks of the zone instead.
 */
export function nominalMinutes(gap: Gap): { least?: number; ideal: number; most?: number } {
  const per = minutesPerUnit[gap.unit];
  const tolerance = gap.unit === 'localDays' ? (gap.toleranceMinutes ?? 0) : 0;
  return {
    ideal: idealOf(gap) * per,
    ...(gap.least === undefined ? {} : { least: gap.least * per - tolerance }),
    ...(gap.most === undefined ? {} : { most: gap.most * per + tolerance }),
  };
}
