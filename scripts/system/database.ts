import { execFileSync } from 'node:child_process';
import { randomBytes } from 'node:crypto';

import pg from 'pg';

import { root } from './root';

/** The database server to work on: DATABASE_URL, or the project's own, which is started when it is down. */
export function databaseServer(): string {
  const given = process.env.DATABASE_URL;
  if (given) return given;
  const words = execFileSync('bash', ['scripts/pg.sh', 'start'], { cwd: root, encoding: 'utf8' });
  return words.trim().split('\n').at(-1) ?? '';
}

async function run(url: string, statement: string) {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}

/** An empty database of its own; `drop` removes it, whoever is still connected. */
export async function freshDatabase(prefix: string): Promise<{ url: string; drop(): Promise<void> }> {
  const server = databaseServer();
  const name = `${prefix}_${randomBytes(6).toString('hex')}`;
  await run(server, `create database ${name}`);
  const url = new URL(server);
  url.pathname = `/${name}`;
  return { url: url.href, drop: () => run(server, `drop database if exists ${name} with (force)`) };
}
