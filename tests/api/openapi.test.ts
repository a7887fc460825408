import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { openApi } from '@/server/openapi';
import { routes } from '@/shared/routes';
import type { RouteSpec } from '@/shared/routes/spec';
import { freshDatabase, type Fresh } from '../support/fresh-database';

interface Operation {
  operationId: string;
  summary: string;
  parameters: { name: string; in: string; required: boolean; schema: object }[];
  requestBody?: { required: boolean; content: Record<string, { schema: object }> };
  responses: Record<string, { description: string; content: Record<string, { schema?: object }> }>;
  security?: object[];
}
interface Document {
  openapi: string;
  info: { title: string; version: string };
  servers: { url: string }[];
  paths: Record<string, Record<string, Operation>>;
  components: { schemas: Record<string, object>; securitySchemes: Record<string, object> };
}

let fresh: Fresh;
let document: Document;
beforeAll(async () => {
  fresh = await freshDatabase();
  const answer = await request(createApp(fresh.deps)).get('/api/openapi.json').expect(200);
  expect(answer.type).toBe('application/json');
  document = answer.body as Document;
});
afterAll(() => fresh.drop());

const all = Object.entries(routes) as [string, RouteSpec][];
const operationOf = (name: string): Operation | undefined => {
  const [method = '', path = ''] = name.split(' ');
  return document.paths[path.replace(/:(\w+)/g, '{$1}')]?.[method.toLowerCase()];
};
/** Every `$ref` of a part of the document, with the part itself as the root of `#/$defs`. */
function refsIn(value: unknown): string[] {
  if (Array.isArray(value)) return value.flatMap(refsIn);
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) =>
    key === '$ref' && typeof inner === 'string' ? [inner] : refsIn(inner),
  );
}
const at = (pointer: string): unknown =>
  pointer
    .replace(/^#\//, '')
    .split('/')
    .map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'))
    .reduce<unknown>((value, key) => (value as Record<string, unknown> | undefined)?.[key], document);

// the rules that are checked: OpenAPI Specification 3.1.0 (OpenAPI Initiative, 2021), from memory
describe('the OpenAPI document', () => {
  it('says what it is and where', () => {
    expect(document).toMatchObject({ openapi: '3.1.0', servers: [{ url: fresh.deps.env.PUBLIC_URL }] });
    expect(document.info.version).toMatch(/^\d+\.\d+\.\d+$/);
    expect(JSON.parse(JSON.stringify(openApi('https://yards.example')))).toMatchObject({
      servers: [{ url: 'https://yards.example' }],
    });
  });

  it('has every route of the table, and no other', () => {
    const named = Object.values(document.paths).flatMap((path) => Object.keys(path));
    expect(named).toHaveLength(all.length);
    expect(all.filter(([name]) => !operationOf(name)).map(([name]) => name)).toEqual([]);
  });

  it('gives every operation a name of its own', () => {
    const ids = all.map(([name]) => operationOf(name)?.operationId);
    expect(new Set(ids).size).toBe(all.length);
  });

  it('resolves every reference', () => {
    const refs = refsIn(document);
    expect(refs).toContain('#/components/schemas/Error');
    expect([...new Set(refs)].filter((ref) => at(ref) === undefined)).toEqual([]);
  });

  it.each(all)('describes %s', (name, spec) => {
    const operation = operationOf(name);
    const inPath = operation?.parameters.filter((parameter) => parameter.in === 'path') ?? [];
    const named = [...name.matchAll(/:(\w+)/g)].map((found) => found[1]);
    expect(inPath.map((parameter) => parameter.name)).toEqual(named);
    expect(inPath.every((parameter) => parameter.required)).toBe(true);
    expect(Boolean(operation?.requestBody)).toBe(Boolean(spec.body));
    expect(Object.keys(operation?.responses ?? {})).toEqual([String(spec.status ?? 200), 'default']);
    expect(operation?.security).toEqual(spec.who === 'anyone' ? [] : undefined);
  });

  it('says what a field is: a body of signing in needs address and password', () => {
    const body = operationOf('POST /api/session')?.requestBody?.content['application/json']?.schema;
    expect(body).toMatchObject({
      type: 'object',
      required: ['email', 'password'],
      properties: { email: { type: 'string', format: 'email' } },
    });
  });
});
