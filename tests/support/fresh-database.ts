import { randomBytes } from 'node:crypto';

import pg from 'pg';
import { pino } from 'pino';
import { inject } from 'vitest';

import { openDb, type Db } from '@/server/db';
import type { Deps } from '@/server/deps';
import { loadEnv } from '@/server/env';
import { migrate } from '@/server/migrate';

export interface Fresh {
  url: string;
  db: Db;
  deps: Deps;
  /** Sets the clock that the server and worker see. */
  setNow(now: Date): void;
  drop(): Promise<void>;
}

async function admin(run: (client: pg.Client) => Promise<unknown>): Promise<void> {
  const client = new pg.Client({ connectionString: inject('databaseUrl') });
  await client.connect();
  await run(client).finally(() => client.end());
}

/** A database of its own for one test file, migrated, with a clock that stands still until it is set. */
export async function freshDatabase(now = new Date('2026-05-04T00:00:00Z')): Promise<Fresh> {
  const name = `test_${randomBytes(6).toString('hex')}`;
  await admin((client) => client.query(`create database ${name}`));
  const url = new URL(inject('databaseUrl'));
  url.pathname = `/${name}`;
  const db = openDb(url.href, 6);
  await migrate(db.sequelize);
  let clock = now;
  const deps: Deps = {
    env: loadEnv({ NODE_ENV: 'test', LOG_LEVEL: 'silent', DATABASE_URL: url.href, DIST_DIR: 'no-such-folder' }),
    sequelize: db.sequelize,
    pool: db.pool,
    log: pino({ level: 'silent' }),
    now: () => clock,
  };
  return {
    url: url.href,
    db,
    deps,
    setNow: (next) => {
      clock = next;
    },
    drop: async () => {
      await db.close();
      await admin((client) => client.query(`drop database ${name} with (force)`));
    },
  };
}
