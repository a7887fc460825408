import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';

import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import { startScriptedSmtp } from '../server/mailServer';
import { openYard, outbox, type Yard } from './kit';

const pause = (ms: number) => new Promise<void>((resolve) => setTimeout(resolve, ms));

describe('the worker as a process', () => {
  let yard: Yard;
  const running = new Set<ChildProcess>();
  beforeAll(async () => {
    yard = await openYard();
  });
  afterAll(() => yard.close());
  beforeEach(async () => {
    await yard.reset('2026-10-01T00:00:00Z');
  });
  afterEach(async () => {
    for (const child of running) child.kill('SIGKILL');
  });

  const start = (smtpUrl: string): ChildProcess => {
    const child = spawn(process.execPath, ['--import', 'tsx', 'jobs/index.ts'], {
      env: {
        ...process.env,
        NODE_ENV: 'test',
        DATABASE_URL: yard.url,
        SMTP_URL: smtpUrl,
        PUBLIC_URL: 'http://localhost:3000',
        WORKER_EVERY: '1',
        LOG_LEVEL: 'silent',
      },
      stdio: 'ignore',
    });
    running.add(child);
    child.once('exit', () => running.delete(child));
    return child;
  };
  const invite = (count: number) =>
    yard.sql(
      `insert into messages (id, dedupe_key, channel, kind, address, params, due_at, next_try_at)
       select gen_random_uuid(), 'invitation:' || n, 'email', 'invitation', 'new' || n || '@example.org',
         '{"link": "http://localhost:3000/invitations/x"}', now() - interval '1 minute', now() - interval '1 minute'
       from generate_series(1, :count) n`,
      { count },
    );
  const states = async () => (await outbox(yard)).map((row) => row['state']);
  const until = async (done: () => boolean | Promise<boolean>) => {
    for (let n = 0; n < 400 && !(await done()); n += 1) await pause(50);
  };
  const idsIn = (texts: readonly string[]) =>
    texts.map((text) => /^Message-ID: <([0-9a-f-]{36})@/im.exec(text)?.[1] ?? '');

  it('ends on SIGTERM after the message in hand', async () => {
    const server = await startScriptedSmtp(() => 'take', 300);
    await invite(20);
    const child = start(server.smtpUrl);
    await until(() => server.texts.length >= 2);
    child.kill('SIGTERM');
    const [code] = await once(child, 'exit');
    const sent = (await states()).filter((state) => state === 'sent').length;
    await server.close();
    expect(code).toBe(0);
    expect(sent).toBe(server.texts.length);
    expect(sent).toBeLessThan(20);
    expect(await yard.sql(`select id from messages where state = 'waiting' and claimed_by is not null`)).toEqual([]);
  });

  it('killed again and again, two at a time, loses nothing; only the message in hand may be repeated, under its id', async () => {
    const server = await startScriptedSmtp(() => 'take', 20);
    const count = 60;
    await invite(count);
    let kills = 0;
    for (; kills < 3; kills += 1) {
      const before = server.texts.length;
      const two = [start(server.smtpUrl), start(server.smtpUrl)];
      await until(() => server.texts.length > before + 5);
      for (const child of two) {
        child.kill('SIGKILL');
        await once(child, 'exit');
      }
      // the lease of the dead is two minutes by the database's clock: let it run out there
      await yard.sql('update messages set claimed_until = clock_timestamp() where claimed_until is not null');
    }
    const last = start(server.smtpUrl);
    await until(async () => (await states()).every((state) => state === 'sent'));
    last.kill('SIGTERM');
    await once(last, 'exit');
    await server.close();
    const ids = idsIn(server.texts);
    expect(new Set(ids).size).toBe(count);
    expect(ids.length - count).toBeLessThanOrEqual(2 * kills);
  });
});
