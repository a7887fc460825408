import { z } from 'zod';

import { apiError } from '@/shared/contracts/common';
import { routes } from '@/shared/routes';
import type { RouteSpec, Who } from '@/shared/routes/spec';

type Json = Record<string, unknown>;

/**
 * Makes JSON Schema of zod's. What refers to itself (a condition within conditions) goes to the document's components:
 * a reference is resolved from the root of the document, not of the schema.
 */
class Schemas {
  readonly components: Record<string, Json> = {};
  private readonly prefixes = new Map<string, string>();

  of(schema: z.ZodType, io: 'input' | 'output'): Json {
    const options = { io, unrepresentable: 'any', target: 'draft-2020-12' } as const;
    const { $schema: _, $defs, ...rest } = z.toJSONSchema(schema, options) as Json & { $defs?: Record<string, Json> };
    if (!$defs) return rest;
    const text = JSON.stringify($defs);
    const prefix = this.prefixes.get(text) ?? `Nested${this.prefixes.size + 1}`;
    this.prefixes.set(text, prefix);
    const pointed = (json: Json): Json =>
      JSON.parse(JSON.stringify(json).replaceAll('"#/$defs/', `"#/components/schemas/${prefix}`)) as Json;
    for (const [name, part] of Object.entries($defs)) this.components[prefix + name] = pointed(part);
    return pointed(rest);
  }
}

const whoWords = (who: Who): string =>
  typeof who === 'string'
    ? who
    : `${who.ability}, judged at ${who.at === 'all' ? 'every place of the person' : who.at}`;

function parametersOf(spec: RouteSpec, schemas: Schemas): Json[] {
  const list = (schema: z.ZodType | undefined, place: 'path' | 'query'): Json[] => {
    if (!schema) return [];
    const json = schemas.of(schema, 'input') as { properties?: Record<string, Json>; required?: string[] };
    return Object.entries(json.properties ?? {}).map(([name, property]) => ({
      name,
      in: place,
      required: place === 'path' || (json.required ?? []).includes(name),
      schema: property,
    }));
  };
  return [...list(spec.params, 'path'), ...list(spec.query, 'query')];
}

function operation(name: string, spec: RouteSpec, schemas: Schemas): Json {
  const json = (schema: Json) => ({ 'application/json': { schema } });
  const content = 'media' in spec.output ? { [spec.output.media]: {} } : json(schemas.of(spec.output, 'output'));
  return {
    operationId: name.replace(/[^A-Za-z0-9]+/g, '_'),
    summary: spec.summary,
    description: `Who may: ${whoWords(spec.who)}.`,
    parameters: parametersOf(spec, schemas),
    ...(spec.body ? { requestBody: { required: true, content: json(schemas.of(spec.body, 'input')) } } : {}),
    responses: {
      [String(spec.status ?? 200)]: { description: 'Done', content },
      default: { description: 'Not done, and why', content: json({ $ref: '#/components/schemas/Error' }) },
    },
    ...(spec.who === 'anyone' ? { security: [] } : {}),
  };
}

/** The interface as an OpenAPI 3.1 document (OpenAPI Initiative, 2021), made from the route table. */
export function openApi(url: string): Json {
  const paths: Record<string, Json> = {};
  const schemas = new Schemas();
  for (const [name, spec] of Object.entries(routes) as [string, RouteSpec][]) {
    const [method = '', path = ''] = name.split(' ');
    const templated = path.replace(/:(\w+)/g, '{$1}');
    paths[templated] = { ...paths[templated], [method.toLowerCase()]: operation(name, spec, schemas) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Yardbell',
      version: '0.1.0',
      description: 'Plans and runs oestrus-synchronisation programs in cattle.',
    },
    servers: [{ url }],
    security: [{ session: [] }],
    paths,
    components: {
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'yardbell' } },
      schemas: { Error: schemas.of(apiError, 'output'), ...schemas.components },
    },
  };
}
