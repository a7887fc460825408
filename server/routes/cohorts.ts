import { dayClock } from '@/shared/when';
import { cancelCohort } from '../commands/cancelCohort';
import { createCohort, patchCohort } from '../commands/editCohort';
import { moveTask, workOutMove, type Move } from '../commands/moveTask';
import { startCohort } from '../commands/startCohort';
import type { Handlers } from '../http/handler';
import { presentFindings } from '../presenters/findings';
import { listCohorts, previewPlan, readAudit, readCohort } from '../queries/cohorts';
import { signedIn } from './people';

function presentMove(move: Move) {
  const { zone, body } = move.source.cohort;
  return {
    effects: move.effects.map(({ task, visit }) => ({
      taskId: task.id,
      title: task.title,
      group: move.group,
      fromAt: task.dueAt.toISOString(),
      toAt: new Date(visit.at).toISOString(),
      fromLocal: dayClock(task.dueAt.getTime(), zone),
      toLocal: dayClock(visit.at, zone),
      windowFromLocal: dayClock(visit.window.earliest, zone),
      windowToLocal: dayClock(visit.window.latest, zone),
    })),
    findings: presentFindings(move.findings, { zone, body }),
    canMove: move.canMove,
  };
}

/** Cohorts: planning, starting, moving, cancelling. */
export const cohortHandlers: Handlers<
  | 'GET /api/cohorts'
  | 'POST /api/properties/:propertyId/cohorts'
  | 'GET /api/cohorts/:cohortId'
  | 'PATCH /api/cohorts/:cohortId'
  | 'GET /api/cohorts/:cohortId/plan'
  | 'POST /api/cohorts/:cohortId/start'
  | 'POST /api/cohorts/:cohortId/cancel'
  | 'GET /api/cohorts/:cohortId/audit'
  | 'POST /api/tasks/:taskId/move/preview'
  | 'POST /api/tasks/:taskId/move'
> = {
  'GET /api/cohorts': ({ actor, input, deps }) => listCohorts(deps, signedIn(actor), input.query),
  'POST /api/properties/:propertyId/cohorts': async ({ actor, input, deps }) => {
    const id = await createCohort(deps, signedIn(actor), input.params.propertyId, input.body);
    return readCohort(deps, signedIn(actor), id);
  },
  'GET /api/cohorts/:cohortId': ({ actor, input, deps }) => readCohort(deps, signedIn(actor), input.params.cohortId),
  'PATCH /api/cohorts/:cohortId': async ({ actor, input, deps }) => {
    await patchCohort(deps, signedIn(actor), input.params.cohortId, input.body);
    return readCohort(deps, signedIn(actor), input.params.cohortId);
  },
  'GET /api/cohorts/:cohortId/plan': ({ input, deps }) => previewPlan(deps, input.params.cohortId),
  'POST /api/cohorts/:cohortId/start': async ({ actor, input, deps }) => {
    await startCohort(deps, signedIn(actor), input.params.cohortId, input.body);
    return readCohort(deps, signedIn(actor), input.params.cohortId);
  },
  'POST /api/cohorts/:cohortId/cancel': async ({ actor, input, deps }) => {
    await cancelCohort(deps, signedIn(actor), input.params.cohortId, input.body.reason);
    return readCohort(deps, signedIn(actor), input.params.cohortId);
  },
  'GET /api/cohorts/:cohortId/audit': ({ input, deps }) => readAudit(deps, input.params.cohortId, input.query),
  'POST /api/tasks/:taskId/move/preview': async ({ input, deps }) =>
    presentMove(await workOutMove(deps, input.params.taskId, input.body)),
  'POST /api/tasks/:taskId/move': async ({ actor, input, deps }) => {
    const cohortId = await moveTask(deps, signedIn(actor), input.params.taskId, input.body);
    return readCohort(deps, signedIn(actor), cohortId);
  },
};
