import type { Request, Response } from 'express';

import type { Input, Output, RouteName } from '@/shared/routes';
import type { Actor } from '../policies/actor';
import type { Deps } from '../deps';

/** Where an ability was judged: the owner of the id that the route names. */
export interface Place {
  propertyId?: string;
  organisationId?: string;
}

export interface HandlerRequest<R extends RouteName> {
  input: Input<R>;
  /** Null only on routes for anyone. */
  actor: Actor | null;
  /** Set on routes whose ability is judged at one place; authorisation is done when a handler runs. */
  place: Place;
  deps: Deps;
  req: Request;
  res: Response;
}

/** Acts and presents; limiting, signing in, validation and authorisation come before, in that order. */
export type Handler<R extends RouteName> = (request: HandlerRequest<R>) => Promise<Output<R>>;
export type Handlers<R extends RouteName> = { [K in R]: Handler<K> };
