/**
 * Colours by scheme. Galvanised greys, one ink, one hi-vis that means only "this is what to do now".
 * The same figures stand in public/app.css, so that the page has its colours before any script runs.
 */
export const palettes = {
  light: {
    page: '#F3F5F6',
    raised: '#FFFFFF',
    sunk: '#E9EDEF',
    rail: '#C6CFD5',
    edge: '#5D6A73',
    ink: '#10171B',
    quiet: '#47545D',
    vis: '#E2F200',
    onVis: '#10171B',
    stop: '#A5170B',
    warn: '#6F4400',
    good: '#0B5F33',
    note: '#0A4E96',
    focus: '#10171B',
    veil: '#10171B99',
  },
  dark: {
    page: '#10161A',
    raised: '#182026',
    sunk: '#0A0F12',
    rail: '#33414A',
    edge: '#8A98A1',
    ink: '#EEF3F5',
    quiet: '#A9B6BE',
    vis: '#E2F200',
    onVis: '#10171B',
    stop: '#FF9C8F',
    warn: '#F2B95C',
    good: '#6FD3A0',
    note: '#8EC5FF',
    focus: '#E2F200',
    veil: '#000000B3',
  },
} as const;

export type Scheme = keyof typeof palettes;
export type ColorName = keyof (typeof palettes)['light'];

const names = Object.keys(palettes.light) as ColorName[];

/** Colours as CSS variables: a change of scheme repaints without rendering anything again. */
export const color = Object.fromEntries(names.map((name) => [name, `var(--${name})`])) as Record<ColorName, string>;

/** Steps of space, in pixels. */
export const space = { xs: 4, s: 8, m: 16, l: 24, xl: 32, xxl: 48 } as const;

/** Least side of a target, in pixels: ordinary, and for a gloved hand at the crush. */
export const target = { normal: 48, crush: 64 } as const;

/** From this width on, in pixels, there is a rail at the left and room for two panes. */
export const wideFrom = 1024;

const figures = "'Arial Narrow', 'Roboto Condensed', 'Liberation Sans Narrow', sans-serif";
const reading = "'Segoe UI', Roboto, 'Helvetica Neue', Arial, sans-serif";

/** One family a weight, as they are loaded; what follows them serves until they have come. */
export const font = {
  figure: `BarlowCondensed_600SemiBold, ${figures}`,
  figureBold: `BarlowCondensed_700Bold, ${figures}`,
  body: `AtkinsonHyperlegibleNext_400Regular, ${reading}`,
  bodyBold: `AtkinsonHyperlegibleNext_700Bold, ${reading}`,
} as const;

/** Type scale: size and line in pixels. */
export const type = {
  title: { fontFamily: font.figureBold, fontWeight: '700', fontSize: 34, lineHeight: 38 },
  heading: { fontFamily: font.figureBold, fontWeight: '700', fontSize: 25, lineHeight: 30 },
  subheading: { fontFamily: font.bodyBold, fontWeight: '700', fontSize: 18, lineHeight: 24 },
  body: { fontFamily: font.body, fontWeight: '400', fontSize: 17, lineHeight: 25 },
  small: { fontFamily: font.body, fontWeight: '400', fontSize: 15, lineHeight: 21 },
  figure: { fontFamily: font.figure, fontWeight: '600', fontSize: 22, lineHeight: 26 },
  bigFigure: { fontFamily: font.figureBold, fontWeight: '700', fontSize: 42, lineHeight: 46 },
} as const;
export type TypeName = keyof typeof type;
