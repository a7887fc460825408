import type pg from 'pg';

import { abilitiesOf } from '@/shared/abilities';
import type { Me } from '@/shared/contracts/people';
import { failure } from '../http/errors';
import { User } from '../models';
import type { Actor } from '../policies/actor';

interface PlaceRow {
  id: string;
  name: string;
  zone: string;
  country: string;
  locale: string;
}

/** The person, their wishes, and every place with what they may do there. */
export async function readMe(pool: pg.Pool, actor: Actor): Promise<Me> {
  const user = await User.findByPk(actor.userId);
  if (!user) throw failure('unauthenticated', 'server.signIn');
  const [properties, organisations] = await Promise.all([
    pool.query<PlaceRow>('select id, name, zone, country, locale from properties where id = any($1) order by name', [
      [...actor.properties.keys()],
    ]),
    pool.query<{ id: string; name: string; kind: string }>(
      'select id, name, kind from organisations where id = any($1) order by name',
      [[...actor.organisations.keys()]],
    ),
  ]);
  return {
    user: { id: user.id, name: user.name, email: user.email },
    preferences: {
      evening: user.remindEvening,
      morning: user.remindMorning,
      closing: user.remindClosing,
      eveningAt: user.eveningAt,
      morningAt: user.morningAt,
    },
    organisations: organisations.rows.map((row) => {
      const roles = [...(actor.organisations.get(row.id) ?? [])];
      return { ...row, roles, abilities: abilitiesOf(roles) };
    }),
    properties: properties.rows.map((row) => {
      const held = actor.properties.get(row.id);
      const roles = [...(held?.roles ?? [])];
      return { ...row, roles, abilities: abilitiesOf(roles), through: held?.through ?? null };
    }),
  };
}
