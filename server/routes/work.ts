import { recordRest, recordWork, undoRecord, type Recorded } from '../commands/recordWork';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import type { Handlers } from '../http/handler';
import { presentTask } from '../presenters/tasks';
import { taskById } from '../queries/tasks';
import { readCalendar, readToday } from '../queries/today';
import { readTaskWork } from '../queries/work';
import { signedIn } from './people';

async function withTask(deps: Deps, taskId: string, result: Recorded) {
  const task = await taskById(deps, taskId);
  if (!task) throw failure('notFound', 'server.notFound');
  return { ...result, task: presentTask(task) };
}

/** Today, the calendar, and recording what was done. */
export const workHandlers: Handlers<
  | 'GET /api/today'
  | 'GET /api/calendar'
  | 'GET /api/tasks/:taskId/work'
  | 'POST /api/tasks/:taskId/records'
  | 'POST /api/tasks/:taskId/rest'
  | 'POST /api/records/:recordId/undo'
> = {
  'GET /api/today': ({ actor, input, deps }) => readToday(deps, signedIn(actor), input.query),
  'GET /api/calendar': ({ actor, input, deps }) => readCalendar(deps, signedIn(actor), input.query),
  'GET /api/tasks/:taskId/work': ({ input, deps }) => readTaskWork(deps, input.params.taskId),
  'POST /api/tasks/:taskId/records': async ({ actor, input, deps }) => {
    const result = await recordWork(deps, signedIn(actor), input.params.taskId, input.body.records);
    return withTask(deps, input.params.taskId, result);
  },
  'POST /api/tasks/:taskId/rest': async ({ actor, input, deps }) => {
    const result = await recordRest(deps, signedIn(actor), input.params.taskId, input.body);
    return withTask(deps, input.params.taskId, result);
  },
  'POST /api/records/:recordId/undo': async ({ actor, input, deps }) => {
    const taskId = await undoRecord(deps, signedIn(actor), input.params.recordId, input.body);
    return withTask(deps, taskId, { accepted: [input.body.id], refused: [] });
  },
};
