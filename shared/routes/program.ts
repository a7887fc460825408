import { z } from 'zod';

import * as k from '../contracts/cohorts';
import * as c from '../contracts/common';
import * as w from '../contracts/work';
import { part } from './spec';

const cohort = z.object({ cohortId: c.id });
const task = z.object({ taskId: c.id });

export const programRoutes = part({
  'GET /api/cohorts': {
    summary: 'Cohorts of every property that the person may see, next task first',
    who: { ability: 'cohort.read', at: 'all' },
    query: c.pageQuery.extend({ propertyId: c.id.optional(), state: k.cohortState.optional() }),
    output: c.page(k.cohortSummary),
  },
  'POST /api/properties/:propertyId/cohorts': {
    summary: 'Begin planning a cohort',
    who: { ability: 'cohort.plan', at: 'propertyId' },
    params: z.object({ propertyId: c.id }),
    body: k.cohortCreate,
    output: k.cohortDetail,
    status: 201,
  },
  'GET /api/cohorts/:cohortId': {
    summary: 'A cohort with groups, tasks, findings and authorities',
    who: { ability: 'cohort.read', at: 'cohortId' },
    params: cohort,
    output: k.cohortDetail,
  },
  'PATCH /api/cohorts/:cohortId': {
    summary: 'Change a cohort that is being planned',
    who: { ability: 'cohort.plan', at: 'cohortId' },
    params: cohort,
    body: k.cohortPatch,
    output: k.cohortDetail,
  },
  'GET /api/cohorts/:cohortId/plan': {
    summary: 'What starting it would make: tasks, windows, head, doses, findings',
    who: { ability: 'cohort.plan', at: 'cohortId' },
    params: cohort,
    output: k.planPreview,
  },
  'POST /api/cohorts/:cohortId/start': {
    summary: 'Start a cohort from the plan that was looked at',
    who: { ability: 'cohort.start', at: 'cohortId' },
    params: cohort,
    body: k.cohortStart,
    output: k.cohortDetail,
  },
  'POST /api/cohorts/:cohortId/cancel': {
    summary: 'Cancel a cohort: what is recorded stays, what is planned is withdrawn',
    who: { ability: 'cohort.cancel', at: 'cohortId' },
    params: cohort,
    body: k.cohortCancel,
    output: k.cohortDetail,
  },
  'GET /api/cohorts/:cohortId/audit': {
    summary: 'Every change of plan',
    who: { ability: 'audit.read', at: 'cohortId' },
    params: cohort,
    query: c.pageQuery,
    output: c.page(k.auditEntry),
  },
  'POST /api/tasks/:taskId/move/preview': {
    summary: 'What moving a task does to the others; nothing is written',
    who: { ability: 'task.move', at: 'taskId' },
    params: task,
    body: k.taskMove,
    output: k.movePreview,
  },
  'POST /api/tasks/:taskId/move': {
    summary: 'Move a task and what hangs on it',
    who: { ability: 'task.move', at: 'taskId' },
    params: task,
    body: k.taskMove,
    output: k.cohortDetail,
  },
  'GET /api/today': {
    summary: "Today's work at every property of the person, overdue first",
    who: { ability: 'work.read', at: 'all' },
    query: w.todayQuery,
    output: w.today,
  },
  'GET /api/calendar': {
    summary: 'Tasks between two local dates',
    who: { ability: 'calendar.read', at: 'all' },
    query: w.calendarQuery,
    output: w.calendar,
  },
  'GET /api/tasks/:taskId/work': {
    summary: 'A task with its animals and records',
    who: { ability: 'work.read', at: 'taskId' },
    params: task,
    output: w.taskWork,
  },
  'POST /api/tasks/:taskId/records': {
    summary: 'Record what was done; repeats change nothing',
    who: { ability: 'work.record', at: 'taskId' },
    params: task,
    body: w.recordsPost,
    output: w.recordsResult,
  },
  'POST /api/tasks/:taskId/rest': {
    summary: 'Record the rest of the group as done',
    who: { ability: 'work.record', at: 'taskId' },
    params: task,
    body: w.restPost,
    output: w.recordsResult,
  },
  'POST /api/records/:recordId/undo': {
    summary: 'Take a record back by a later record that names it',
    who: { ability: 'work.record', at: 'recordId' },
    params: z.object({ recordId: c.id }),
    body: w.undoPost,
    output: w.recordsResult,
  },
});
