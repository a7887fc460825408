import { execFileSync } from 'node:child_process';
import path from 'node:path';

import type { TestProject } from 'vitest/node';

/** Finds a PostgreSQL for the tests: the one named, or the project's own, started if need be. */
export default function setup(project: TestProject): void {
  const named = process.env.DATABASE_URL_TEST ?? process.env.DATABASE_URL;
  const script = path.resolve(import.meta.dirname, '../../scripts/pg.sh');
  const url = named ?? execFileSync('bash', [script, 'start'], { encoding: 'utf8' }).trim().split('\n').at(-1) ?? '';
  project.provide('databaseUrl', url);
}

declare module 'vitest' {
  export interface ProvidedContext {
    databaseUrl: string;
  }
}
