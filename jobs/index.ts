import { randomUUID } from 'node:crypto';
import { hostname } from 'node:os';

import pino from 'pino';

import { openDb } from '@/server/db';
import { loadEnv } from '@/server/env';
import { smtpTransport } from '@/server/mail/transport';

import { startWorker } from './worker';

/** The worker's process: wakes, works, and on SIGTERM or SIGINT finishes the message in hand before it ends. */
const env = loadEnv();
const log = pino({ level: env.LOG_LEVEL, name: 'worker' });
const db = openDb(env.DATABASE_URL, 4);
const mail = smtpTransport({ smtpUrl: env.SMTP_URL, from: env.MAIL_FROM, publicUrl: env.PUBLIC_URL });
const deps = { env, sequelize: db.sequelize, pool: db.pool, log, now: () => new Date() };
const name = `${hostname()}/${process.pid}/${randomUUID().slice(0, 8)}`;
const worker = startWorker({ deps, mail, worker: name }, env.WORKER_EVERY);

let ending = false;
async function end(signal: string): Promise<void> {
  if (ending) return;
  ending = true;
  log.info({ signal }, 'stopping');
  await worker.stop();
  mail.close();
  await db.close();
}
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void end(signal));

log.info({ worker: name, every: env.WORKER_EVERY }, 'worker started');
void worker.wake();
