import { pino } from 'pino';

import { openDb } from '../db';
import { loadEnv } from '../env';
import { migrate } from '../migrate';
import { seedDemo } from './demo';

const env = loadEnv();
const db = openDb(env.DATABASE_URL);
await migrate(db.sequelize);
const deps = {
  env,
  sequelize: db.sequelize,
  pool: db.pool,
  log: pino({ level: env.LOG_LEVEL }),
  now: () => new Date(),
};
const seeded = await seedDemo(deps);
console.log(seeded ? 'Demo data seeded.' : 'The database has data already: nothing seeded.');
await db.close();
