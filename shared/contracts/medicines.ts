import { z } from 'zod';

import { t } from '../messages';
import { active, administrationRoute, animalClass, doseUnit, id, instant, localDate, name, note } from './common';

export const product = z.object({
  id,
  organisationId: id,
  name: z.string(),
  active,
  /** Amount of active in one mL, or in one device or patch. */
  strength: z.number(),
  unit: doseUnit,
  per: z.enum(['mL', 'piece', 'g']),
  packSize: z.number().nullable(),
  route: administrationRoute,
  meatDays: z.number().nullable(),
  milkHours: z.number().nullable(),
  openDays: z.number().nullable(),
});
export const productCreate = product.omit({ organisationId: true }).extend({ organisationId: id, name });
export const productBatch = z.object({
  id,
  productId: id,
  product: z.string(),
  number: z.string(),
  expiry: localDate,
  quantity: z.number(),
  used: z.number(),
  broachedAt: instant.nullable(),
});
export const productBatchCreate = z.object({
  id,
  productId: id,
  number: name,
  expiry: localDate,
  quantity: z.number().positive({ error: t('field.amount') }),
});

/** A vet's written direction: what, how much, for how many of which class, valid until. */
export const authority = z.object({
  id,
  propertyId: id,
  cohortId: id.nullable(),
  active,
  productId: id.nullable(),
  product: z.string().nullable(),
  amount: z.number(),
  unit: doseUnit,
  route: administrationRoute,
  classes: z.array(animalClass),
  head: z.number().int(),
  /** Head already treated under it, and those still planned. */
  used: z.number().int(),
  validFrom: localDate,
  validTo: localDate,
  meatDays: z.number().nullable(),
  milkHours: z.number().nullable(),
  directions: z.string(),
  issuedBy: z.string(),
  issuedAt: instant,
  withdrawnAt: instant.nullable(),
});
export type Authority = z.infer<typeof authority>;
export const authorityCreate = z.object({
  id,
  active,
  productId: id.nullish(),
  amount: z.number().positive({ error: t('field.dose') }),
  unit: doseUnit,
  route: administrationRoute,
  classes: z.array(animalClass).min(1, { error: t('field.classes') }),
  head: z
    .number()
    .int()
    .positive({ error: t('field.head') })
    .max(100000),
  validFrom: localDate,
  validTo: localDate,
  meatDays: z.number().min(0).max(400).nullish(),
  milkHours: z.number().min(0).max(4000).nullish(),
  directions: note,
});
export const medicines = z.object({
  products: z.array(product),
  batches: z.array(productBatch),
  authorities: z.array(authority),
});
/** What the cohort needs, beside what is authorised: the prefilled form of the vet. */
export const authorityNeed = z.object({
  active,
  amount: z.number().nullable(),
  unit: doseUnit,
  route: administrationRoute,
  head: z.number().int(),
  classes: z.array(animalClass),
  firstAt: instant.nullable(),
  lastAt: instant.nullable(),
  covered: z.number().int(),
});
