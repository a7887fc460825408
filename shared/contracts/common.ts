import { z } from 'zod';

import { t } from '../messages';
import { actives, animalClasses, doseUnits, routes, stepKinds } from '@/protocols/types';

/** Client-made or server-made id. A repeated write with the same id is recognised. */
export const id = z.uuid();
/** Instant, ISO 8601 in UTC with `Z`. */
export const instant = z.iso.datetime();
export const localDate = z.iso.date();
/** Wall-clock date and time in the property's zone, `YYYY-MM-DDTHH:MM`. */
export const localDateTime = z
  .string()
  .regex(/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/, { error: t('field.dateTime') })
  .refine(isOnTheCalendar, { error: t('field.noSuchTime') });

/** Hours past 23, a 31 February: written rightly and still no time. The zone's own gaps are another matter. */
function isOnTheCalendar(local: string): boolean {
  const at = new Date(`${local}:00Z`);
  return !Number.isNaN(at.getTime()) && at.toISOString().startsWith(local) && local >= '1900';
}
export const clockTime = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, { error: t('field.clock') });
export const name = z
  .string()
  .trim()
  .min(1, { error: t('field.empty') })
  .max(120, { error: t('field.most120') });
export const note = z
  .string()
  .trim()
  .max(2000, { error: t('field.most2000') });
export const email = z
  .email({ error: t('field.email') })
  .max(254)
  .transform((v) => v.toLowerCase());
export const animalClass = z.enum(animalClasses);
export const stepKind = z.enum(stepKinds);
export const active = z.enum(actives);
export const doseUnit = z.enum(doseUnits);
export const administrationRoute = z.enum(routes);

/** A finding as it travels: the core's code and figures, and the catalogue's words for them. */
export const finding = z.object({
  code: z.string(),
  severity: z.enum(['stop', 'warn', 'note']),
  steps: z.array(z.string()),
  visits: z.array(z.string()).optional(),
  params: z.record(z.string(), z.union([z.string(), z.number(), z.array(z.string())])),
  path: z.string().optional(),
  message: z.string(),
  remedy: z.string(),
  source: z.string().optional(),
});
export type FindingView = z.infer<typeof finding>;

/** What a failed request answers: a stable id, a sentence for people, every bad field with its path. */
export const apiError = z.object({
  error: z.object({
    id: z.enum([
      'invalid',
      'unauthenticated',
      'forbidden',
      'notFound',
      'conflict',
      'stale',
      'gone',
      'tooMany',
      'refused',
      'unavailable',
      'server',
    ]),
    message: z.string(),
    fields: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
    findings: z.array(finding).optional(),
    requestId: z.string().optional(),
  }),
});
export type ApiError = z.infer<typeof apiError>;

/** Keyset page: pass `after` of the last answer to go on; `next` absent at the end. */
export const pageQuery = z.object({
  after: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});
export const page = <T extends z.ZodType>(item: T) => z.object({ items: z.array(item), next: z.string().nullable() });
export const ok = z.object({ ok: z.literal(true) });
