/** A typed figure: with a comma or a point; null where nothing is typed, NaN where it is no figure. */
export const readFigure = (text: string): number | null =>
  text.trim() === '' ? null : Number(text.trim().replace(',', '.'));

/** True where something is typed that is no figure: sent on, it would be read as nothing and clear what is known. */
export const isNoFigure = (text: string): boolean => Number.isNaN(readFigure(text));
