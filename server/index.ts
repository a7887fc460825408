import { pino } from 'pino';

import { createApp } from './app';
import { openDb } from './db';
import { loadEnv, type Env } from './env';
import { toAppError } from './http/errors';
import { migrate } from './migrate';

/** The environment; when it is not right the start ends with what is wrong, and no stack. */
function environment(): Env {
  try {
    return loadEnv();
  } catch (error) {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    process.exit(1);
  }
}

const env = environment();
const log = pino({ level: env.LOG_LEVEL });
const db = openDb(env.DATABASE_URL);
const done = await migrate(db.sequelize).catch((error: unknown) => {
  const away = toAppError(error).id === 'unavailable';
  log.fatal(away ? 'the database does not answer; look at DATABASE_URL' : 'the database could not be migrated');
  log.fatal(error instanceof Error ? error.message : String(error));
  process.exit(1);
});
if (done.length > 0) log.info({ done }, 'migrated');

const app = createApp({ env, log, sequelize: db.sequelize, pool: db.pool, now: () => new Date() });
const server = app.listen(env.PORT, env.HOST, (error?: Error) => {
  if (error) {
    log.fatal({ err: error }, `cannot listen on ${env.HOST}:${env.PORT}; choose another port with PORT`);
    process.exit(1);
  }
  log.info(`listening on http://${env.HOST}:${env.PORT}`);
});

let stopping = false;
/** Lets requests in hand finish, then closes the database. */
function stop(): void {
  if (stopping) return;
  stopping = true;
  server.close(() => void db.close().then(() => process.exit(0)));
  server.closeIdleConnections();
  setTimeout(() => process.exit(1), 10_000).unref();
}
process.on('SIGTERM', stop);
process.on('SIGINT', stop);
