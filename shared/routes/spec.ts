import type { z } from 'zod';

import type { Ability } from '../abilities';

/**
 * Who may call a route.
 * `anyone`: also nobody signed in. `signedIn`: every signed-in person, about themselves.
 * An ability is judged at the place that owns the named id (`at`): a property for most, an organisation for
 * `protocol.*` and `product.*`. `at: 'all'` lists what the person may see everywhere, and so is empty at worst.
 */
export type Who =
  | 'anyone'
  | 'signedIn'
  | { ability: Ability; at: OwnedParam; in?: 'params' | 'body' }
  | { ability: Ability; at: 'all' };

/** Ids whose owner the server can find; each stands in the path or body under this very name. */
export type OwnedParam =
  | 'propertyId'
  | 'organisationId'
  | 'cohortId'
  | 'taskId'
  | 'animalId'
  | 'recordId'
  | 'authorityId'
  | 'membershipId'
  | 'invitationId'
  | 'protocolId'
  | 'versionId';

export interface RouteSpec {
  summary: string;
  who: Who;
  /** Rate limit class: `auth` for what guesses secrets, `upload` for large bodies; absent: the general one. */
  limit?: 'auth' | 'upload';
  params?: z.ZodType;
  query?: z.ZodType;
  body?: z.ZodType;
  /** JSON answer, or the media type of an answer that is not JSON. */
  output: z.ZodType | { media: string };
  status?: 200 | 201 | 202;
}

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
export type RouteKey = `${Method} /${string}`;

/** Keeps the exact types of a part of the table while checking its shape. */
export const part = <const T extends Record<RouteKey, RouteSpec>>(routes: T): T => routes;
