import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';

import { freshDatabase } from './database';
import { freePort } from './ports';
import { answering, finish, launch, type Program } from './program';
import { root } from './root';

export interface SystemOptions {
  /** Fill the database with the demo data (default true). */
  seed?: boolean;
  /** Start the worker and a mail catcher too (default true). */
  worker?: boolean;
  /** Further environment of every program. */
  env?: Record<string, string>;
}

/** The whole of Yardbell on free ports with a database of its own, from the builds in build/ and dist/. */
export interface System {
  /** Origin of page and interface, such as http://127.0.0.1:40123. */
  base: string;
  databaseUrl: string;
  /** Address of the mail catcher's page; its messages are at /email. */
  mail: string;
  /** The last words of every program. */
  words(): string;
  stop(): Promise<void>;
}

async function mailCatcher(folder: string): Promise<{ program: Program; smtp: number; web: number }> {
  const [smtp, web] = [await freePort(), await freePort()];
  const args = ['--smtp', `${smtp}`, '--web', `${web}`, '--ip', '127.0.0.1', '--web-ip', '127.0.0.1', '--silent'];
  const bin = 'node_modules/maildev/bin/maildev';
  const program = launch('mail catcher', [bin, ...args, '--mail-directory', folder], {});
  await answering(program, `http://127.0.0.1:${web}/email`);
  return { program, smtp, web };
}

export async function startSystem(options: SystemOptions = {}): Promise<System> {
  const { seed = true, worker = true } = options;
  const folder = mkdtempSync(path.join(tmpdir(), 'yardbell-'));
  const database = await freshDatabase('run');
  const programs: Program[] = [];
  const stop = async () => {
    await Promise.all(programs.map((program) => program.stop()));
    await database.drop();
    rmSync(folder, { recursive: true, force: true });
  };
  try {
    const port = await freePort();
    const base = `http://127.0.0.1:${port}`;
    const mail = worker ? await mailCatcher(folder) : null;
    if (mail) programs.push(mail.program);
    const env = {
      NODE_ENV: 'test',
      LOG_LEVEL: 'warn',
      DATABASE_URL: database.url,
      DIST_DIR: path.join(root, 'dist'),
      HOST: '127.0.0.1',
      PORT: `${port}`,
      PUBLIC_URL: base,
      WORKER_EVERY: '2',
      ...(mail ? { SMTP_URL: `smtp://127.0.0.1:${mail.smtp}?ignoreTLS=true` } : {}),
      ...options.env,
    };
    const node = (name: string, file: string) => launch(name, ['--enable-source-maps', file], env);
    if (seed) await finish(node('seed', 'build/server/seeds/run.js'));
    const server = node('server', 'build/server/index.js');
    programs.push(server);
    await answering(server, `${base}/api/health`);
    if (worker) programs.push(node('worker', 'build/jobs/index.js'));
    const words = () => programs.map((program) => `--- ${program.name}\n${program.words()}`).join('\n');
    return { base, databaseUrl: database.url, mail: `http://127.0.0.1:${mail?.web ?? 0}`, words, stop };
  } catch (error) {
    await stop();
    throw error;
  }
}
