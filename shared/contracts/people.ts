import { z } from 'zod';

import { t } from '../messages';
import { roles } from '../abilities';
import { clockTime, email, id, instant, name } from './common';

export const role = z.enum(roles);
export const password = z
  .string()
  .min(12, { error: t('field.passwordShort') })
  .max(200, { error: t('field.most200') });

export const signIn = z.object({
  email,
  password: z
    .string()
    .min(1, { error: t('field.password') })
    .max(200),
});

export const preferences = z.object({
  evening: z.boolean(),
  morning: z.boolean(),
  closing: z.boolean(),
  eveningAt: clockTime,
  morningAt: clockTime,
});

export const me = z.object({
  user: z.object({ id, name: z.string(), email: z.string() }),
  preferences,
  organisations: z.array(
    z.object({ id, name: z.string(), kind: z.string(), roles: z.array(role), abilities: z.array(z.string()) }),
  ),
  properties: z.array(
    z.object({
      id,
      name: z.string(),
      zone: z.string(),
      country: z.string(),
      locale: z.string(),
      roles: z.array(role),
      abilities: z.array(z.string()),
      /** Organisation through which the person comes here, when not by a membership of the property itself. */
      through: z.string().nullable(),
    }),
  ),
});
export type Me = z.infer<typeof me>;
export type PropertySummary = Me['properties'][number];

export const yardHours = z.object({ from: clockTime, to: clockTime });
export const property = z.object({
  id,
  name: z.string(),
  zone: z.string(),
  country: z.string(),
  region: z.string().nullable(),
  locale: z.string(),
  latitude: z.number().nullable(),
  longitude: z.number().nullable(),
  yardHours: yardHours.nullable(),
  milkings: z.array(clockTime),
  weekendDays: z.array(z.number().int().min(1).max(7)),
  engagements: z.array(
    z.object({
      organisationId: id,
      organisation: z.string(),
      scope: z.string(),
      from: z.string(),
      to: z.string().nullable(),
    }),
  ),
});
export const propertyPatch = z.object({
  name: name.optional(),
  yardHours: yardHours.nullish(),
  milkings: z.array(clockTime).max(4).optional(),
  weekendDays: z.array(z.number().int().min(1).max(7)).optional(),
});

export const person = z.object({
  membershipId: id.nullable(),
  userId: id,
  name: z.string(),
  email: z.string(),
  role,
  through: z.string().nullable(),
});
export const invitation = z.object({ id, email: z.string(), role, expiresAt: instant, invitedBy: z.string() });
export const people = z.object({ people: z.array(person), invitations: z.array(invitation) });
export const invitationCreate = z.object({ id, email, role: z.enum(['manager', 'staff', 'calendarOnly']) });
export const invitationLook = z.object({
  email: z.string(),
  role,
  place: z.string(),
  invitedBy: z.string(),
  /** True when the e-mail address already has an account: then no password is asked, the person signs in. */
  known: z.boolean(),
});
export const invitationAccept = z.object({ name: name.optional(), password });

export const calendarLink = z.object({
  id,
  label: z.string(),
  propertyId: id.nullable(),
  property: z.string().nullable(),
  createdAt: instant,
  lastReadAt: instant.nullable(),
});
/** The address is secret and shown once: only a hash of it is kept. */
export const calendarLinkWithUrl = calendarLink.extend({ url: z.url() });
export const calendarLinkCreate = z.object({ id, label: name, propertyId: id.nullable() });
