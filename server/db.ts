import pg from 'pg';
import { Sequelize } from 'sequelize';

import { initModels } from './models';

// date, time and timestamp without zone stay the text that they are: the driver's Date would read them in the
// machine's own zone
const asText = (value: string) => value;
pg.types.setTypeParser(pg.types.builtins.DATE, asText);
pg.types.setTypeParser(pg.types.builtins.TIME, (value: string) => value.slice(0, 5));
pg.types.setTypeParser(pg.types.builtins.TIMESTAMP, (value: string) => value.slice(0, 16).replace(' ', 'T'));
pg.types.setTypeParser(pg.types.builtins.NUMERIC, Number);

export interface Db {
  sequelize: Sequelize;
  /** The driver's own pool, for sessions and for read models where speed counts. */
  pool: pg.Pool;
  close(): Promise<void>;
}

/** Opens a database; nothing is connected until the first query. */
export function openDb(url: string, poolSize = 10): Db {
  const sequelize = new Sequelize(url, {
    dialect: 'postgres',
    dialectModule: pg,
    logging: false,
    pool: { max: poolSize, acquire: 15_000 },
    define: { underscored: true, timestamps: false },
  });
  initModels(sequelize);
  const pool = new pg.Pool({ connectionString: url, max: poolSize, connectionTimeoutMillis: 10_000 });
  // an idle connection that the server drops must not end the process
  pool.on('error', () => undefined);
  return {
    sequelize,
    pool,
    async close() {
      await pool.end();
      await sequelize.close();
    },
  };
}
