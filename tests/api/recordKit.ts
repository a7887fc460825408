import { randomUUID } from 'node:crypto';

import type { CohortDetail } from '@/shared/contracts/cohorts';
import type { TaskWork } from '@/shared/contracts/work';
import type { Output } from '@/shared/routes';
import { addAnimals, sqlOf, startedCohort, type Program } from './programKit';

export type Recorded = Output<'POST /api/tasks/:taskId/records'>;
export type RecordPart = Record<string, unknown> & { animalId: string | null };

/** 07:12 at the home property, on the morning that devices go in. */
export const inAt = '2026-05-12T21:12:00.000Z';
export const entry = (part: RecordPart) => ({ id: randomUUID(), outcome: 'done', at: inAt, ...part });

/** Ways to record, undo and look at work, as the crew. */
export function crewOf(program: Program) {
  const { agents, fresh, world } = program;
  const send = (taskId: string, records: object[], role: 'staff' | 'technician' = 'staff') =>
    agents[role].post(`/api/tasks/${taskId}/records`).send({ records });
  return {
    send,
    record: async (taskId: string, ...parts: RecordPart[]) =>
      (await send(taskId, parts.map(entry)).expect(200)).body as Recorded,
    rest: (taskId: string, expectedHead: number, more: object = {}) =>
      agents.staff.post(`/api/tasks/${taskId}/rest`).send({ id: randomUUID(), at: inAt, expectedHead, ...more }),
    undo: (recordId: string, id: string = randomUUID()) =>
      agents.staff.post(`/api/records/${recordId}/undo`).send({ id, at: inAt }),
    workOf: async (taskId: string) =>
      (await agents.staff.get(`/api/tasks/${taskId}/work`).expect(200)).body as TaskWork,
    stepsOf: (recordId: string) =>
      sqlOf(
        program,
        `select s.step_id, s.outcome, s.active, s.amount, s.unit, s.product_batch_id, s.authority_id, r.direction_user_id
          from record_steps s join records r on r.id = s.record_id where s.record_id = $1 order by s.step_id`,
        [recordId],
      ),
    /** A running cohort of so many heifers, on the morning that devices go in. */
    heifers: async (count: number): Promise<{ cohort: CohortDetail; animals: string[] }> => {
      fresh.setNow(new Date('2026-05-04T00:00:00Z'));
      const animals = await addAnimals(world.property.id, count);
      const cohort = await startedCohort(program, { groups: [{ animalIds: animals }] });
      fresh.setNow(new Date('2026-05-12T22:00:00Z'));
      return { cohort, animals };
    },
  };
}
export type Crew = ReturnType<typeof crewOf>;
