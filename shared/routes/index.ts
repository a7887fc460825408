import type { z } from 'zod';

import { herdRoutes } from './herd';
import { peopleRoutes } from './people';
import { programRoutes } from './program';
import { protocolRoutes } from './protocols';

/** Every route of the server. Validation, the typed client, the OpenAPI document and the access test read this. */
export const routes = { ...peopleRoutes, ...protocolRoutes, ...herdRoutes, ...programRoutes };

export type Routes = typeof routes;
export type RouteName = keyof Routes;

type Parsed<S, K extends string> = S extends { [P in K]: z.ZodType } ? z.output<S[K]> : undefined;
type Given<S, K extends string> = S extends { [P in K]: z.ZodType } ? z.input<S[K]> : undefined;

/** What a handler gets after validation. */
export interface Input<R extends RouteName> {
  params: Parsed<Routes[R], 'params'>;
  query: Parsed<Routes[R], 'query'>;
  body: Parsed<Routes[R], 'body'>;
}
/** What a caller passes. */
export interface CallInput<R extends RouteName> {
  params: Given<Routes[R], 'params'>;
  query: Given<Routes[R], 'query'>;
  body: Given<Routes[R], 'body'>;
}
/** JSON answer; routes that answer with another media type have `string`. */
export type Output<R extends RouteName> = Routes[R]['output'] extends z.ZodType
  ? z.output<Routes[R]['output']>
  : string;
