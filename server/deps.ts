import type { Logger } from 'pino';
import type { Sequelize } from 'sequelize';
import type pg from 'pg';

import type { Env } from './env';

/** What the server works with; the clock is passed in so that tests can move it. */
export interface Deps {
  env: Env;
  sequelize: Sequelize;
  pool: pg.Pool;
  log: Logger;
  now(): Date;
}
