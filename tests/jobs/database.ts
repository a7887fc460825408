import { randomUUID } from 'node:crypto';
import pg from 'pg';
import pino from 'pino';
import { Sequelize } from 'sequelize';
import type { Deps } from '@/server/deps';
import { migrations } from '@/server/migrations';

const base = 'postgres://postgres@127.0.0.1:55991';
export async function openTestDeps(now: () => Date): Promise<{ url: string; deps: Deps; close(): Promise<void> }> {
  const name = `t${randomUUID().replaceAll('-', '')}`;
  const admin = new pg.Client(`${base}/postgres`);
  await admin.connect();
  await admin.query(`create database ${name}`);
  await admin.end();
  const sequelize = new Sequelize(`${base}/${name}`, { dialect: 'postgres', logging: false });
  const pool = new pg.Pool({ connectionString: `${base}/${name}` });
  for (const migration of migrations) await migration.up({ name: '', context: sequelize.getQueryInterface() } as never);
  const deps = {
    env: { PUBLIC_URL: 'http://localhost:3000' },
    sequelize,
    pool,
    log: pino({ level: 'silent' }),
    now,
  } as unknown as Deps;
  return {
    url: `${base}/${name}`,
    deps,
    close: async () => {
      await sequelize.close();
      await pool.end();
    },
  };
}
