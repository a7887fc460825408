import { z } from 'zod';

import { t } from '../messages';
import { animalClasses, type ProtocolBody } from '@/protocols/types';
import {
  active,
  administrationRoute,
  animalClass,
  clockTime,
  doseUnit,
  finding,
  id,
  instant,
  name,
  stepKind,
} from './common';

const key = z
  .string()
  .min(1)
  .max(60)
  .regex(/^[A-Za-z0-9_-]+$/, { error: t('field.key') });
const text = z.string().max(1000);
const mark = z.enum(['read', 'memory', 'derived']);
const bound = z.number().min(-100000).max(100000);

const condition: z.ZodType = z.lazy(() =>
  z.union([
    z.strictObject({ all: z.array(condition).max(10) }),
    z.strictObject({ any: z.array(condition).max(10) }),
    z.strictObject({ not: condition }),
    z.strictObject({ option: key, is: key }),
    z.strictObject({ observed: key, is: key }),
    z.strictObject({ class: z.array(animalClass) }),
  ]),
);

const item = z.strictObject({
  active,
  amount: z
    .number()
    .positive({ error: t('field.amount') })
    .max(100000)
    .optional(),
  unit: doseUnit,
  per: z.enum(['head', 'kg']),
  byClass: z.partialRecord(z.enum(animalClasses), z.number().positive()).optional(),
  route: administrationRoute,
  site: text.optional(),
  withholding: z
    .strictObject({
      meatDays: z.number().min(0).max(400).optional(),
      milkHours: z.number().min(0).max(4000).optional(),
    })
    .optional(),
});

const step = z.strictObject({
  id: key,
  kind: stepKind,
  label: z.string().max(80).optional(),
  level: z.enum(['animal', 'group']),
  visit: key,
  when: condition.optional(),
  items: z.array(item).max(6),
  repeat: z
    .strictObject({
      every: z.strictObject({ days: z.number().positive().optional(), minutes: z.number().positive().optional() }),
      count: z.number().int().min(1).max(60),
      amounts: z.array(z.number().positive()).optional(),
    })
    .optional(),
  observe: key.optional(),
  credential: z.enum(['vet', 'technician']).optional(),
  sourceLabel: z.string().max(40).optional(),
  note: text.optional(),
});

const gap = z.strictObject({
  id: key,
  from: key,
  to: key,
  unit: z.enum(['elapsedHours', 'localDays', 'milkings']),
  least: bound.optional(),
  ideal: bound.optional(),
  most: bound.optional(),
  clock: clockTime.optional(),
  toleranceMinutes: z.number().min(0).max(720).optional(),
  toleranceMark: mark.optional(),
  when: condition.optional(),
  source: z.string().max(200).optional(),
  mark: mark.optional(),
  note: text.optional(),
});

/** Shape of a protocol body. Meaning (unknown steps, contradictions, ...) is the core's `checkProtocol`. */
export const protocolBody = z.strictObject({
  schema: z.literal(1),
  name,
  summary: text,
  family: z.enum([
    'gnrhDevice',
    'gnrh',
    'oestradiol',
    'prostaglandin',
    'progestagenFeed',
    'presynchronised',
    'naturalService',
  ]),
  classes: z.array(animalClass).min(1, { error: t('field.suits') }),
  biology: z.enum(['taurus', 'indicus', 'any']),
  options: z
    .array(
      z.strictObject({
        id: key,
        label: name,
        values: z
          .array(z.strictObject({ id: key, label: name }))
          .min(2)
          .max(6),
        default: key,
      }),
    )
    .max(6),
  observations: z
    .array(
      z.strictObject({
        id: key,
        label: name,
        results: z
          .array(z.strictObject({ id: key, label: name }))
          .min(2)
          .max(4),
        onUnknown: key,
      }),
    )
    .max(6),
  visits: z.array(z.strictObject({ id: key, label: name, yarded: z.boolean() })).max(40),
  steps: z.array(step).max(80),
  gaps: z.array(gap).max(120),
  factGaps: z
    .array(
      z.strictObject({
        id: key,
        fact: z.enum(['calving', 'birth', 'lastService']),
        to: key,
        leastDays: z.number().min(0).max(2000).optional(),
        mostDays: z.number().min(0).max(2000).optional(),
        source: z.string().max(200).optional(),
        mark: mark.optional(),
        note: text.optional(),
      }),
    )
    .max(10),
  deadlines: z
    .array(
      z.strictObject({
        id: key,
        event: z.enum(['heatSeen', 'deviceLost', 'calved', 'testedOpen']),
        step: key,
        leastHours: bound.optional(),
        idealHours: bound.optional(),
        mostHours: bound.optional(),
        source: z.string().max(200).optional(),
        mark: mark.optional(),
      }),
    )
    .max(10),
  timingAnchor: key,
  serviceStep: key,
  exits: z.array(z.enum(['servedEarly', 'pregnant', 'withdrawn'])),
  next: z
    .array(
      z.strictObject({ outcome: z.enum(['open', 'pregnant']), library: z.string().max(80).optional(), note: text }),
    )
    .optional(),
  lateChoices: z.record(key, text).optional(),
  sources: z
    .array(
      z.strictObject({
        id: z.string().max(80),
        title: z.string().max(400),
        publisher: z.string().max(200),
        year: z.number().int().optional(),
        url: z.string().max(600).optional(),
        mark,
        note: text.optional(),
      }),
    )
    .max(30),
  notes: z.array(text).max(30),
});

/** The schema parses what the type says; the cast bridges zod's `unknown` for the recursive condition. */
export const asProtocolBody = (value: z.infer<typeof protocolBody>): ProtocolBody => value as ProtocolBody;

export const librarySummary = z.object({
  id: z.string(),
  name: z.string(),
  summary: z.string(),
  family: z.string(),
  classes: z.array(animalClass),
  biology: z.string(),
  yardings: z.number(),
  lengthDays: z.number(),
  serviceInterval: z.string(),
  sources: z.number(),
  fromMemory: z.boolean(),
});
export type LibrarySummary = z.infer<typeof librarySummary>;
export const libraryProtocol = librarySummary.extend({ body: protocolBody, findings: z.array(finding) });

export const versionState = z.enum(['workingCopy', 'signedOff', 'retired']);
export const versionSummary = z.object({
  id,
  number: z.number().int(),
  state: versionState,
  revision: z.number().int(),
  updatedAt: instant,
  signedBy: z.string().nullable(),
  signedAt: instant.nullable(),
});
export const protocolSummary = z.object({
  id,
  organisationId: id,
  organisation: z.string(),
  name: z.string(),
  summary: z.string(),
  classes: z.array(animalClass),
  libraryId: z.string().nullable(),
  /** Newest signed-off version, the one a cohort starts from. */
  current: versionSummary.nullable(),
  workingCopy: versionSummary.nullable(),
});
export type ProtocolSummary = z.infer<typeof protocolSummary>;
export const protocolDetail = protocolSummary.extend({ versions: z.array(versionSummary), canEdit: z.boolean() });
export const versionDetail = versionSummary.extend({
  protocolId: id,
  organisationId: id,
  body: protocolBody,
  findings: z.array(finding),
  canEdit: z.boolean(),
  canSignOff: z.boolean(),
});
export type VersionDetail = z.infer<typeof versionDetail>;

export const protocolCreate = z.object({
  id,
  organisationId: id,
  versionId: id,
  name,
  from: z.union([z.object({ libraryId: z.string() }), z.object({ versionId: id })]).optional(),
});
export const versionPut = z.object({ revision: z.number().int(), body: protocolBody });
export const signOff = z.object({ revision: z.number().int() });
export const workingCopyCreate = z.object({ id });
