import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';

import { afterAll, describe, expect, it } from 'vitest';

const root = path.resolve(import.meta.dirname, '../..');
const out = path.join(root, 'tests/out');
mkdirSync(out, { recursive: true });
// inside the repository, so that '@/' means what it means for real files
const folder = mkdtempSync(path.join(out, 'cycles-'));
afterAll(() => rmSync(folder, { recursive: true }));

function cyclesOf(files: Record<string, string>) {
  for (const [name, text] of Object.entries(files)) writeFileSync(path.join(folder, name), text);
  const run = spawnSync(process.execPath, ['scripts/cycles.mjs', folder], { cwd: root, encoding: 'utf8' });
  return { code: run.status, words: run.stdout + run.stderr };
}
const here = `@/${path.relative(root, folder)}`;

describe('the search for import cycles', () => {
  it('follows aliases and imports of types', () => {
    const { code, words } = cyclesOf({
      'a.ts': `import type { B } from '${here}/b';\nexport interface A { b: B }\n`,
      'b.ts': `import type { A } from './a';\nexport interface B { a: A }\n`,
    });
    expect(code).toBe(1);
    expect(words).toContain('cycle: a.ts -> b.ts -> a.ts');
  });
  it('is content with a chain', () => {
    const { code } = cyclesOf({
      'a.ts': `import type { B } from '${here}/b';\nexport interface A { b: B }\n`,
      'b.ts': `export interface B { a: 1 }\n`,
    });
    expect(code).toBe(0);
  });
});
