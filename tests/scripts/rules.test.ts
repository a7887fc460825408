import path from 'node:path';

import { ESLint } from 'eslint';
import { describe, expect, it } from 'vitest';

const eslint = new ESLint({ cwd: path.resolve(import.meta.dirname, '../..') });

/** What the linter says about a file of this name with these words in it: "rule: message". */
async function complaints(filePath: string, text: string) {
  const [result] = await eslint.lintText(`${text}\n`, { filePath });
  return (result?.messages ?? [])
    .filter(({ ruleId }) => !/no-unused-vars|import\/no-unresolved|import\/first/.test(ruleId ?? ''))
    .map(({ ruleId, message }) => `${ruleId}: ${message}`);
}
const imports = (specifier: string, types = false) =>
  `import ${types ? 'type ' : ''}{ a } from '${specifier}';\nvoid 0;`;

describe('import rules', () => {
  it.each([
    ['protocols/plan/x.ts', 'temporal-polyfill'],
    ['protocols/plan/x.ts', '../time/zoned'],
    ['shared/contracts/x.ts', 'zod'],
    ['shared/x.ts', '@/protocols/types'],
    ['server/routes/x.ts', '@/shared/contracts/common'],
    ['server/routes/x.ts', 'express'],
    ['jobs/tasks/x.ts', '@/server/queries/audience'],
    ['hooks/x.ts', '@/lib/api'],
    ['components/today/x.tsx', '@/hooks/useToday'],
    ['components/ui/x.tsx', '@/components/theme/tokens'],
    ['app/x.tsx', '@/components/today/TodayScreen'],
    ['lib/x.ts', '@/shared/messages'],
    ['tests/api/x.ts', '@/server/deps'],
    ['scripts/x.ts', '@/server/deps'],
  ])('%s may import %s', async (file, specifier) => {
    expect(await complaints(file, imports(specifier))).toEqual([]);
  });

  it.each([
    ['protocols/plan/x.ts', 'zod', 'the core is pure'],
    ['protocols/plan/x.ts', 'node:fs', 'the core is pure'],
    ['protocols/plan/x.ts', '@/shared/when', 'protocols may not import shared'],
    ['protocols/plan/x.ts', '../../shared/when', 'protocols may not import shared'],
    ['shared/x.ts', 'express', 'protocols and zod only'],
    ['shared/x.ts', '@/lib/api', 'shared may not import lib'],
    ['shared/x.ts', '@/shared/contracts/common', 'brings zod along'],
    ['server/routes/x.ts', '@/lib/api', 'server may not import lib'],
    ['server/routes/x.ts', '@/jobs/claim', 'server may not import jobs'],
    ['jobs/tasks/x.ts', '@/server/routes/today', 'jobs may not import server'],
    ['lib/x.ts', '@/hooks/useToday', 'lib may not import hooks'],
    ['hooks/x.ts', '@/components/ui/Button', 'hooks may not import components'],
    ['components/today/x.tsx', '@/app/index', 'components may not import app'],
    ['components/ui/x.tsx', '@/components/today/TodayScreen', 'knows no feature'],
    ['components/ui/x.tsx', '../today/TodayScreen', 'knows no feature'],
    ['components/today/x.tsx', '@/server/deps', 'components may not import server'],
    ['app/x.tsx', '@/jobs/schedule', 'app may not import jobs'],
    ['lib/x.ts', '@/shared/contracts/common', 'brings zod along'],
    ['lib/x.ts', '@/shared/routes', 'brings zod along'],
    ['lib/x.ts', 'zod', 'no zod at run time'],
    ['lib/x.ts', 'node:fs', 'runs in a browser'],
    ['lib/x.ts', 'sequelize', 'belongs to the server'],
    ['server/x.ts', '@/tests/support/x', 'nothing imports tests'],
    ['scripts/x.ts', '../tests/support/x', 'nothing imports tests'],
    ['app/x.tsx', '../components/today/TodayScreen', "imported as '@/components/today/TodayScreen'"],
  ])('%s may not import %s', async (file, specifier, sentence) => {
    expect(await complaints(file, imports(specifier))).toEqual([expect.stringContaining(sentence)]);
  });

  it('lets the client have the types of contracts, and of nothing above it', async () => {
    expect(await complaints('lib/x.ts', imports('@/shared/contracts/common', true))).toEqual([]);
    expect(await complaints('lib/x.ts', "import { type a } from '@/shared/routes';\nvoid 0;")).toEqual([]);
    expect(await complaints('lib/x.ts', imports('@/server/deps', true))).toHaveLength(1);
    expect(await complaints('shared/x.ts', imports('@/hooks/useToday', true))).toHaveLength(1);
  });

  it.each([
    "export { a } from '@/server/deps';",
    "export * from '@/server/deps';",
    "export const a = () => import('@/server/deps');",
    "export type A = import('@/server/deps').Deps;",
    "export const a = require('@/server/deps');",
  ])('sees %s', async (text) => {
    expect(await complaints('lib/x.ts', text)).toContainEqual(expect.stringContaining('lib may not import server'));
  });
});

describe('purity of the core', () => {
  it.each([
    'export const a = Date.now();',
    'export const a = new Date();',
    'export const a = new Date(0).getHours();',
    'export const a = Math.random();',
    "export const a = new Intl.DateTimeFormat('en').format(0);",
    'export const a = (1).toLocaleString();',
    'export const a = process.env.TZ;',
    "import { Temporal } from 'temporal-polyfill';\nexport const a = Temporal.Now.instant();",
  ])('refuses %s in protocols', async (text) => {
    expect(await complaints('protocols/plan/x.ts', text)).not.toEqual([]);
  });
  it('lets the server read its clock', async () => {
    expect(await complaints('server/x.ts', 'export const a = Date.now();')).toEqual([]);
  });
});

describe('rules of the house', () => {
  const lines = (count: number) => Array.from({ length: count }, (_, at) => `export const a${at} = ${at};`).join('\n');
  const body = (count: number) => `export function f() {\n${'  void 0;\n'.repeat(count - 2)}}`;

  it('limits a file to 400 lines, tests too', async () => {
    expect(await complaints('server/x.ts', lines(400))).toEqual([]);
    expect(await complaints('server/x.ts', lines(401))).toEqual([expect.stringContaining('max-lines:')]);
    expect(await complaints('tests/api/x.test.ts', lines(401))).toEqual([expect.stringContaining('max-lines:')]);
  });
  it('limits a function to 60 lines, a screen to 100, a test not', async () => {
    expect(await complaints('server/x.ts', body(60))).toEqual([]);
    expect(await complaints('server/x.ts', body(61))).toEqual([expect.stringContaining('max-lines-per-function')]);
    expect(await complaints('components/today/TodayScreen.tsx', body(100))).toEqual([]);
    expect(await complaints('components/today/TodayScreen.tsx', body(101))).toHaveLength(1);
    expect(await complaints('tests/api/x.test.ts', body(101))).toEqual([]);
  });
  it.each([
    'export const a: any = 1;',
    '// @ts-ignore\nexport const a = 1;',
    '// @ts-expect-error\nexport const a = 1;',
    '// eslint-disable-next-line\nexport const a = 1;',
  ])('refuses %s', async (text) => {
    expect(await complaints('server/x.ts', text)).toHaveLength(1);
  });
});
