import { randomUUID } from 'node:crypto';

import autocannon from 'autocannon';

import { demoPerson } from '../system/people';
import { freePort } from '../system/ports';
import { answering, launch } from '../system/program';
import type { System } from '../system/system';
import type { Row } from './table';

const seconds = 4;
const connections = 8;

async function load(url: string, headers: Record<string, string> = {}): Promise<{ rate: number; p99: number }> {
  await autocannon({ url, headers, connections, duration: 1 });
  const result = await autocannon({ url, headers, connections, duration: seconds });
  if (result.errors > 0 || result.non2xx > 0) {
    throw new Error(`${url}: ${result.errors} errors, ${result.non2xx} answers that were not 2xx`);
  }
  return { rate: result.requests.total / seconds, p99: result.latency.p99 };
}

/** Cookie of a signed-in demo manager. */
async function signIn(base: string): Promise<string> {
  const { email, password } = demoPerson('manager');
  const answer = await fetch(`${base}/api/session`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: base },
    body: JSON.stringify({ email, password }),
  });
  const cookie = answer.headers.getSetCookie()[0]?.split(';')[0];
  if (!answer.ok || !cookie) throw new Error(`sign-in: ${answer.status}`);
  return cookie;
}

/** The address of a new calendar link, on this very server. */
async function calendarLink(base: string, cookie: string): Promise<string> {
  const answer = await fetch(`${base}/api/calendar-links`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: base, cookie },
    body: JSON.stringify({ id: randomUUID(), label: 'Bench', propertyId: null }),
  });
  if (!answer.ok) throw new Error(`calendar link: ${answer.status} ${await answer.text()}`);
  return new URL(new URL(((await answer.json()) as { url: string }).url).pathname, base).href;
}

/** Requests per second of what people ask most, beside a bare Express route in a process of its own. */
export async function serverRows(system: System): Promise<Row[]> {
  const { base } = system;
  const port = await freePort();
  const bare = launch('bare server', ['scripts/bench/bare.mjs', `${port}`], {});
  try {
    await answering(bare, `http://127.0.0.1:${port}/`);
    const cookie = await signIn(base);
    const link = await calendarLink(base, cookie);
    const reference = await load(`http://127.0.0.1:${port}/`);
    const rows: Row[] = [{ what: 'bare Express route', value: reference.rate, unit: '/s' }];
    const add = async (what: string, url: string, headers = {}) => {
      const { rate, p99 } = await load(url, headers);
      const name = `${what} (p99 ${p99} ms)`;
      rows.push({ what: name, value: rate, unit: '/s', ratio: rate / reference.rate, beside: 'the bare route' });
    };
    await add('GET /api/health', `${base}/api/health`);
    await add('GET /api/today', `${base}/api/today`, { cookie });
    await add('GET the calendar link (.ics)', link);
    return rows;
  } finally {
    await bare.stop();
  }
}
