import { z } from 'zod';

import { id, instant, localDate, note } from './common';
import { task } from './cohorts';

/** done: given; notDone: could not be done (reason); lost: device found missing; withdrawn: leaves the program. */
export const outcomes = ['done', 'notDone', 'lost', 'withdrawn'] as const;
export const outcome = z.enum(outcomes);
export const reasons = [
  'absent',
  'sick',
  'deviceMissing',
  'refusedByCrew',
  'servedEarly',
  'pregnant',
  'injured',
  'other',
] as const;

/** One act on one animal (or on a number of head without ids) in one task. Client-made id: a repeat changes nothing. */
export const recordInput = z.object({
  id,
  animalId: id.nullable(),
  /** Head, when the group is a number only: how many this act covers. */
  head: z.number().int().positive().max(5000).default(1),
  outcome,
  reason: z.enum(reasons).optional(),
  /** Steps of the visit with another outcome than the act's own. */
  exceptions: z
    .array(z.object({ stepId: z.string(), outcome, reason: z.enum(reasons).optional() }))
    .max(10)
    .optional(),
  /** What was seen, by observation id. */
  observed: z.record(z.string(), z.string()).optional(),
  /** When it was done, by the phone's clock. */
  at: instant,
  batchId: id.nullish(),
  note: note.optional(),
});
export type RecordInput = z.input<typeof recordInput>;
export const recordsPost = z.object({ records: z.array(recordInput).min(1).max(500) });

export const workRecord = z.object({
  id,
  taskId: id,
  animalId: id.nullable(),
  tag: z.string().nullable(),
  head: z.number().int(),
  outcome,
  reason: z.string().nullable(),
  exceptions: z.array(z.object({ stepId: z.string(), outcome, reason: z.string().nullable() })),
  observed: z.record(z.string(), z.string()),
  at: instant,
  atLocal: z.string(),
  by: z.string(),
  note: z.string().nullable(),
  /** Later record that takes this one back, if any. */
  undoneBy: id.nullable(),
});
export type WorkRecord = z.infer<typeof workRecord>;
export const recordsResult = z.object({
  accepted: z.array(id),
  /** Refused acts with the reason: kept and shown on the phone, never dropped. */
  refused: z.array(z.object({ id, message: z.string() })),
  task,
});
/** The rest of the group at once: everything without a record gets one. `id` makes it repeatable. */
export const restPost = z.object({ id, at: instant, batchId: id.nullish(), expectedHead: z.number().int().min(0) });
export const undoPost = z.object({ id, at: instant, reason: note.optional() });

export const workAnimal = z.object({
  animalId: id,
  tag: z.string(),
  eid: z.string().nullable(),
  class: z.string(),
  record: workRecord.nullable(),
});
export const taskWork = z.object({
  task,
  animals: z.array(workAnimal),
  /** Records of head-only groups, and every taken-back record. */
  records: z.array(workRecord),
  batches: z.array(z.object({ id, label: z.string(), active: z.string(), expiry: localDate })),
  authorityNote: z.string().nullable(),
  /** Under whose direction: the issuing vet. */
  direction: z.string().nullable(),
});
export type TaskWork = z.infer<typeof taskWork>;

export const todayQuery = z.object({ date: localDate.optional(), propertyId: id.optional() });
export const today = z.object({
  now: instant,
  properties: z.array(
    z.object({
      propertyId: id,
      property: z.string(),
      zone: z.string(),
      /** Local date that "today" is at this property. */
      date: localDate,
      overdue: z.array(task),
      tasks: z.array(task),
      /** The next thing when today is empty. */
      next: task.nullable(),
    }),
  ),
});
export type Today = z.infer<typeof today>;
export const calendarQuery = z.object({ from: localDate, to: localDate, propertyId: id.optional() });
export const calendar = z.object({
  tasks: z.array(task),
  holidays: z.array(z.object({ propertyId: id, date: localDate, name: z.string() })),
});
