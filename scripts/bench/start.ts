import { execFile } from 'node:child_process';
import { promisify } from 'node:util';

import { freshDatabase } from '../system/database';
import { freePort } from '../system/ports';
import { root } from '../system/root';
import type { Row } from './table';

/** How long `npm start` takes when everything is built, the first time on an empty database and then again. */
export async function startRows(): Promise<Row[]> {
  const database = await freshDatabase('bench');
  const [port, smtp, web] = [await freePort(), await freePort(), await freePort()];
  const env = {
    ...process.env,
    DATABASE_URL: database.url,
    PORT: `${port}`,
    MAIL_PORT: `${smtp}`,
    MAIL_WEB_PORT: `${web}`,
  };
  const seconds = async () => {
    const { stdout } = await promisify(execFile)('bash', ['scripts/start.sh', '--check'], { cwd: root, env });
    return Number(/Started in ([\d.]+) s/.exec(stdout)?.[1]);
  };
  try {
    const first = await seconds();
    const second = await seconds();
    return [
      { what: 'start with an empty database (migrate, seed)', value: first, unit: 's' },
      { what: 'second start', value: second, unit: 's', ratio: second / first, beside: 'the first' },
    ];
  } finally {
    await database.drop();
  }
}
