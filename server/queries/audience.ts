import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';

import { may, type Role } from '@/shared/abilities';

/** A person who may be told of a property's tasks, with what they want to be told. */
export interface Listener {
  userId: string;
  email: string;
  roles: readonly Role[];
  evening: boolean;
  morning: boolean;
  closing: boolean;
  /** Wall-clock times, `HH:MM`, in the property's zone. */
  eveningAt: string;
  morningAt: string;
}

/**
 * Everyone who may see the work or the calendar of the property on that local day: members of the property, and members
 * of organisations whose engagement is in force.
 */
export async function audienceOf(
  sequelize: Sequelize,
  propertyId: string,
  localDay: string,
  transaction?: Transaction,
): Promise<Listener[]> {
  const people = await sequelize.query<Listener>(
    `select u.id as "userId", u.email, array_agg(distinct m.role) as roles,
       u.remind_evening as evening, u.remind_morning as morning, u.remind_closing as closing,
       to_char(u.evening_at, 'HH24:MI') as "eveningAt", to_char(u.morning_at, 'HH24:MI') as "morningAt"
     from memberships m join users u on u.id = m.user_id
     where m.ended_at is null and (m.property_id = :propertyId or exists (
       select from engagements e where e.organisation_id = m.organisation_id and e.property_id = :propertyId
         and (m.role <> 'vet' or e.scope = 'veterinary') and e.from_date <= :localDay and (e.to_date is null or e.to_date >= :localDay)))
     group by u.id
     order by u.id`,
    { type: QueryTypes.SELECT, replacements: { propertyId, localDay }, ...(transaction ? { transaction } : {}) },
  );
  return people.filter((person) => may(person.roles, 'work.read') || may(person.roles, 'calendar.read'));
}

/** The zone of a property. */
export async function zoneOf(sequelize: Sequelize, propertyId: string): Promise<string> {
  const [row] = await sequelize.query<{ zone: string }>('select zone from properties where id = :propertyId', {
    type: QueryTypes.SELECT,
    replacements: { propertyId },
  });
  return row?.zone ?? 'UTC';
}
