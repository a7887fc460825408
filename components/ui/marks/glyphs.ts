import type { StepKind } from '@/protocols/types';

/** A line drawing on a field of 24 by 24: paths, and circles as centre and radius. One weight, no fill. */
export interface Glyph {
  paths?: readonly string[];
  circles?: readonly (readonly [number, number, number])[];
}

/** Body of the device: a stem with two arms. */
const device = 'M12 21v-8M12 13c-4 0-6-2-6-5M12 13c4 0 6-2 6-5';
/** A straw in its sheath. */
const straw = 'M3 13 12.5 3.5l3 3L6 16l-3 1ZM9 7l3 3';
const hexagon = 'M12 3l8 4.5v9L12 21l-8-4.5v-9Z';
const bull = 'M4 4c0 5 2 7 5 7h6c3 0 5-2 5-7M8 11v5a4 4 0 0 0 8 0v-5';

/** Our own drawings, told apart without colour. A step's mark always stands with its word. */
export const stepGlyphs: Record<StepKind, Glyph> = {
  deviceIn: { paths: [device, 'M8.5 6.5 12 3l3.5 3.5'] },
  deviceOut: { paths: [device, 'M8.5 3 12 6.5 15.5 3'] },
  deviceCheck: { paths: [device], circles: [[12, 5, 2.6]] },
  prostaglandin: { paths: ['M12 3c4 5 6 8 6 11.5a6 6 0 0 1-12 0C6 11 8 8 12 3Z'] },
  gnrh: { paths: ['M3 16h2c4 0 4-10 7-10s3 10 7 10h2', 'M3 20h18'] },
  hcg: { paths: ['M3 16c3 0 2-9 4.5-9S10 15 12 15s2-8 4.5-8S18 16 21 16', 'M3 20h18'] },
  oestradiolBenzoate: { paths: [hexagon, 'M8.5 12h7'] },
  oestradiolCypionate: { paths: [hexagon, 'M8.5 10.2h7M8.5 13.8h7'] },
  oestradiolValerate: { paths: [hexagon, 'M8.5 9h7M8.5 12h7M8.5 15h7'] },
  ecg: { paths: ['M5 20h3.5V11a3.5 3.5 0 0 1 7 0v9H19', 'M5 20V10a7 7 0 0 1 14 0v10'] },
  progesterone: { paths: ['M12 3.5v17M3.5 12h17'], circles: [[12, 12, 8.5]] },
  fsh: {
    circles: [
      [4.5, 17.5, 1.8],
      [10.5, 15.5, 2.9],
      [18, 10, 4.3],
    ],
  },
  progestagenFeed: { paths: ['M2.5 10h19l-3 10h-13Z', 'M8 3v3.5M12 3v3.5M16 3v3.5'] },
  heatAidOn: { paths: ['M3 7.5h18v9H3ZM3 12h18'] },
  heatAidRead: { paths: ['M3 7.5h18v9H3Z', 'M5 16.5l5-9M9.5 16.5l5-9M14 16.5l5-9'] },
  heatRound: { paths: ['M2 12c4.5-8 15.5-8 20 0-4.5 8-15.5 8-20 0Z'], circles: [[12, 12, 3]] },
  fixedTimeService: { paths: [straw, 'M17 14.5V17h2.2'], circles: [[17, 17, 4.6]] },
  serviceOnHeat: {
    paths: [straw, 'M17 11.5c3 3 4.5 4.8 4.5 7a4.2 4.2 0 0 1-9 0c0-1.6 1-2.6 2-3.6l.8 1.6c1-1.2 1.7-2.8 1.7-5Z'],
  },
  embryoTransfer: { paths: [straw, 'M17 12.4v9.2M12.4 17h9.2'], circles: [[17, 17, 4.6]] },
  ovarianScan: { paths: ['M12 3 4 18c5 4 11 4 16 0Z'], circles: [[12, 14.5, 2.4]] },
  tractScore: { paths: ['M12 21v-6', 'M12 15c-1-4-8-3.5-8-8.5a3 3 0 0 1 6 0', 'M12 15c1-4 8-3.5 8-8.5a3 3 0 0 0-6 0'] },
  weigh: { paths: ['M4 20 6.5 8h11L20 20Z', 'M9 8a3 3 0 0 1 6 0', 'M12 16l2.5-4'] },
  vaccination: {
    paths: ['M16.5 3 21 7.5M18.8 5.2l-2.8 2.8M12 5.5l6.5 6.5', 'M14 7.5 6.5 15v2.5H9l7.5-7.5M6.5 17.5 3 21'],
  },
  calvesOff: {
    paths: ['M14.5 3v18'],
    circles: [
      [7, 12, 4.5],
      [19.5, 12, 2.5],
    ],
  },
  calvesBack: {
    paths: ['M22 12h-3M20.5 9.5 18 12l2.5 2.5'],
    circles: [
      [7, 12, 4.5],
      [14, 12, 2.5],
    ],
  },
  bullIn: { paths: [bull, 'M12 2.5v5M9.8 5.4 12 7.6l2.2-2.2'] },
  bullOut: { paths: [bull, 'M12 8V2.8M9.8 5 12 2.8 14.2 5'] },
  bullTest: { paths: [bull, 'M9.5 5l2 2L15 3'] },
  pregnancyTest: { paths: ['M14.5 8.5a4 4 0 1 0 1.5 5.5c-2 .5-3-.6-2.8-2'], circles: [[12, 12, 9]] },
  draftOff: { paths: ['M12 21v-8L5 5M12 13l7-8', 'M5 10V5h5M14 5h5v5'] },
  move: { paths: ['M3 12h17M14 6l6 6-6 6'] },
  other: { paths: ['M4.5 4.5h15v15h-15ZM8.5 12h7'] },
};

/** Marks of the places, in the same hand. */
export const placeGlyphs = {
  today: { paths: ['M12 3v2M4 17h16M6.5 17v-4.5a5.5 5.5 0 0 1 11 0V17M10 20.5h4'] },
  cohorts: { paths: ['M4 6.5h16M4 12h16M4 17.5h16'] },
  calendar: { paths: ['M4 6h16v14H4ZM4 11h16M8.5 3.5V8M15.5 3.5V8'] },
  protocols: { paths: ['M2.5 12h19M7 7.5v9M12 4v16M17 9v6'] },
  herd: {
    paths: ['M7.5 9h9v4.5L14 20h-4l-2.5-6.5Z', 'M7.5 9C5 9 3.5 7.5 3 5M16.5 9C19 9 20.5 7.5 21 5', 'M10 16.5h4'],
  },
  medicines: { paths: ['M9 3h6M10 3v4l-3 4v10h10V11l-3-4V3M7 14h10'] },
  people: {
    paths: ['M3.5 20v-2a5.5 5.5 0 0 1 11 0v2M16 13a4.5 4.5 0 0 1 4.5 4.5V20', 'M16 4.5a3.2 3.2 0 0 1 0 6.2'],
    circles: [[9, 7.5, 3.2]],
  },
  more: {
    circles: [
      [5, 12, 1.2],
      [12, 12, 1.2],
      [19, 12, 1.2],
    ],
  },
} as const satisfies Record<string, Glyph>;
export type PlaceName = keyof typeof placeGlyphs;
