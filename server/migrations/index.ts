import * as people from './0001-people';
import * as designHerd from './0002-design-herd';
import * as program from './0003-program';
import * as telling from './0004-telling';

/** A static list, not a glob: the same under tsx, vitest and the bundle. */
export const migrations = [
  { name: '0001-people', ...people },
  { name: '0002-design-herd', ...designHerd },
  { name: '0003-program', ...program },
  { name: '0004-telling', ...telling },
];
