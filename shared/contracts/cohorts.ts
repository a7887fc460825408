import { z } from 'zod';

import { t } from '../messages';
import {
  active,
  administrationRoute,
  animalClass,
  doseUnit,
  finding,
  id,
  instant,
  localDateTime,
  name,
  note,
  stepKind,
} from './common';
import { authority, authorityNeed } from './medicines';

export const dose = z.object({
  stepId: z.string(),
  active,
  amount: z.number().nullable(),
  unit: doseUnit,
  route: administrationRoute,
  /** For the head of this task, in `unit`; null when the amount differs by head. */
  total: z.number().nullable(),
  /** mL or pieces per head, when a product is chosen. */
  volume: z.string().nullable(),
});
export const taskStep = z.object({
  id: z.string(),
  kind: stepKind,
  label: z.string(),
  level: z.enum(['animal', 'group']),
  /** Words for the branch, such as "not in heat by 66 h". */
  condition: z.string().nullable(),
  /** The condition itself, for working out which steps an animal gets once it was looked at. */
  when: z.unknown().optional(),
  /** What this step looks at, when it is an observation. */
  observation: z
    .object({
      id: z.string(),
      label: z.string(),
      results: z.array(z.object({ id: z.string(), label: z.string() })),
      onUnknown: z.string(),
    })
    .optional(),
  doses: z.array(dose),
  /** Keys of the cautions that stand where the act is done. */
  cautions: z.array(z.string()),
});
export const taskState = z.enum(['planned', 'inWork', 'done', 'cancelled']);
export const task = z.object({
  id,
  propertyId: id,
  property: z.string(),
  zone: z.string(),
  cohortId: id,
  cohort: z.string(),
  groupId: id,
  group: z.string(),
  visitId: z.string(),
  title: z.string(),
  occurrence: z.number().int(),
  yarded: z.boolean(),
  dueAt: instant,
  windowFrom: instant,
  windowTo: instant,
  /** The same three in the property's zone. */
  dueLocal: z.string(),
  windowFromLocal: z.string(),
  windowToLocal: z.string(),
  /** Words for the interval, such as "54 h since device out". */
  sinceAnchor: z.string().nullable(),
  state: taskState,
  head: z.number().int(),
  done: z.number().int(),
  exceptions: z.number().int(),
  steps: z.array(taskStep),
  revision: z.number().int(),
  movedFrom: instant.nullable(),
});
export type Task = z.infer<typeof task>;
export type TaskStep = z.infer<typeof taskStep>;

export const group = z.object({
  id,
  name: z.string(),
  class: animalClass,
  head: z.number().int(),
  /** True when the group holds a number and no animals yet. */
  headOnly: z.boolean(),
  serviceLocal: z.string().nullable(),
});
export const cohortState = z.enum(['planning', 'running', 'finished', 'cancelled']);
export const cohortSummary = z.object({
  id,
  propertyId: id,
  property: z.string(),
  zone: z.string(),
  name: z.string(),
  state: cohortState,
  protocolName: z.string().nullable(),
  protocolVersion: z.number().int().nullable(),
  head: z.number().int(),
  groups: z.number().int(),
  /** First thing not done yet. */
  next: z.object({ taskId: id, title: z.string(), group: z.string(), dueAt: instant, dueLocal: z.string() }).nullable(),
  serviceAt: instant.nullable(),
  serviceLocal: z.string().nullable(),
  overdue: z.number().int(),
  findings: z.object({ stop: z.number(), warn: z.number(), note: z.number() }),
});
export type CohortSummary = z.infer<typeof cohortSummary>;

/** Where the plan hangs: the visit that is fixed and its local time. `visit` null: the service step's visit. */
export const anchor = z.object({ visit: z.string().nullable(), local: localDateTime });

export const groupInput = z.object({
  id,
  name,
  class: animalClass,
  /** Animals of the property, or else a head count alone. */
  animalIds: z.array(id).max(5000).optional(),
  head: z
    .number()
    .int()
    .positive({ error: t('field.head') })
    .max(5000)
    .optional(),
  /** The group's own anchor time; absent: the cohort's. */
  local: localDateTime.optional(),
});
export const cohortCreate = z.object({
  id,
  name,
  protocolVersionId: id.nullish(),
  options: z.record(z.string(), z.string()).optional(),
  anchor: anchor.nullish(),
  groups: z.array(groupInput).max(20).optional(),
});
export const cohortPatch = z.object({
  name: name.optional(),
  protocolVersionId: id.nullish(),
  options: z.record(z.string(), z.string()).optional(),
  anchor: anchor.nullish(),
  groups: z.array(groupInput).max(20).optional(),
  revision: z.number().int(),
});

export const plannedTask = z.object({
  groupId: id,
  group: z.string(),
  visitId: z.string(),
  title: z.string(),
  occurrence: z.number().int(),
  yarded: z.boolean(),
  dueAt: instant,
  windowFrom: instant,
  windowTo: instant,
  dueLocal: z.string(),
  windowFromLocal: z.string(),
  windowToLocal: z.string(),
  sinceAnchor: z.string().nullable(),
  head: z.number().int(),
  steps: z.array(taskStep),
});
export type PlannedTask = z.infer<typeof plannedTask>;
export const planPreview = z.object({
  tasks: z.array(plannedTask),
  findings: z.array(finding),
  /** Hash of everything the plan was made from: `start` refuses when it has changed since. */
  fingerprint: z.string(),
  canStart: z.boolean(),
  needs: z.array(authorityNeed),
});
export type PlanPreview = z.infer<typeof planPreview>;

export const cohortDetail = cohortSummary.extend({
  revision: z.number().int(),
  protocolVersionId: id.nullable(),
  options: z.record(z.string(), z.string()),
  anchor: anchor.nullable(),
  /** With `animalIds` while planning. */
  groupList: z.array(group.extend({ animalIds: z.array(id), local: z.string().nullable() })),
  tasks: z.array(task),
  planFindings: z.array(finding),
  authorities: z.array(authority),
  needs: z.array(authorityNeed),
  abilities: z.array(z.string()),
  startedBy: z.string().nullable(),
  startedAt: instant.nullable(),
});
export type CohortDetail = z.infer<typeof cohortDetail>;

export const cohortStart = z.object({ fingerprint: z.string(), revision: z.number().int() });
export const cohortCancel = z.object({ reason: note });

export const taskMove = z.object({ dueLocal: localDateTime, revision: z.number().int() });
export const moveEffect = z.object({
  taskId: id,
  title: z.string(),
  group: z.string(),
  fromAt: instant,
  toAt: instant,
  fromLocal: z.string(),
  toLocal: z.string(),
  windowFromLocal: z.string(),
  windowToLocal: z.string(),
});
export const movePreview = z.object({ effects: z.array(moveEffect), findings: z.array(finding), canMove: z.boolean() });
export type MovePreview = z.infer<typeof movePreview>;

export const auditEntry = z.object({
  id,
  at: instant,
  by: z.string(),
  action: z.string(),
  summary: z.string(),
});
