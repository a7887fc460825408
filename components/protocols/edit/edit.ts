import type { Gap, ProtocolBody, Step, StepKind, Visit } from '@/protocols/types';

import { newStep } from './defaults';
import { freeId } from './ids';

/** Edits of a protocol body: each takes a body and gives a new one, so that undo is keeping the old. */

/** Adds a step to a visit, after its last step. */
export function addStep(body: ProtocolBody, visit: string, kind: StepKind): { body: ProtocolBody; id: string } {
  const id = freeId(
    kind,
    body.steps.map((step) => step.id),
  );
  const last = body.steps.findLastIndex((step) => step.visit === visit);
  const steps = [...body.steps];
  steps.splice(last === -1 ? steps.length : last + 1, 0, newStep(id, kind, visit));
  return { body: { ...body, steps }, id };
}

/** Adds a visit at the end with one step, a local day after the last visit: a gap is never left out. */
export function addVisit(body: ProtocolBody, label: string, kind: StepKind): { body: ProtocolBody; id: string } {
  const id = freeId(
    `visit${body.visits.length + 1}`,
    body.visits.map((visit) => visit.id),
  );
  const before = body.steps.at(-1);
  const withStep = addStep({ ...body, visits: [...body.visits, { id, label, yarded: true }] }, id, kind);
  if (!before) return { body: withStep.body, id };
  return { body: addGap(withStep.body, before.id, withStep.id).body, id };
}

/** Adds a gap of one local day, give or take an hour (the vet's own figure), between two steps. */
export function addGap(body: ProtocolBody, from: string, to: string): { body: ProtocolBody; id: string } {
  const id = freeId(
    `${from}-${to}`,
    body.gaps.map((gap) => gap.id),
  );
  const gap: Gap = { id, from, to, unit: 'localDays', least: 1, ideal: 1, most: 1, toleranceMinutes: 60 };
  return { body: { ...body, gaps: [...body.gaps, gap] }, id };
}

const replaceById = <T extends { id: string }>(list: T[], id: string, change: (item: T) => T): T[] =>
  list.map((item) => (item.id === id ? change(item) : item));

/** Changes a step as a whole. */
export const updateStep = (body: ProtocolBody, id: string, next: Step): ProtocolBody =>
  dropEmptyVisits({ ...body, steps: replaceById(body.steps, id, () => next) });

export const updateVisit = (body: ProtocolBody, id: string, patch: Partial<Omit<Visit, 'id'>>): ProtocolBody => ({
  ...body,
  visits: replaceById(body.visits, id, (visit) => ({ ...visit, ...patch })),
});

export const updateGap = (body: ProtocolBody, id: string, next: Gap): ProtocolBody => ({
  ...body,
  gaps: replaceById(body.gaps, id, () => next),
});

export const removeGap = (body: ProtocolBody, id: string): ProtocolBody => ({
  ...body,
  gaps: body.gaps.filter((gap) => gap.id !== id),
});

/**
 * Removes a step. Gaps that hung on it move to another step of the same visit (the time is the visit's), and go
 * only when the visit goes with its last step.
 */
export function removeStep(body: ProtocolBody, id: string): ProtocolBody {
  const step = body.steps.find((s) => s.id === id);
  if (!step) return body;
  const heir = body.steps.find((s) => s.visit === step.visit && s.id !== id)?.id;
  const steps = body.steps.filter((s) => s.id !== id);
  const swap = (name: string) => (name === id && heir ? heir : name);
  const gaps = body.gaps
    .map((gap) => ({ ...gap, from: swap(gap.from), to: swap(gap.to) }))
    .filter((gap) => gap.from !== id && gap.to !== id && gap.from !== gap.to);
  const factGaps = body.factGaps.map((gap) => ({ ...gap, to: swap(gap.to) })).filter((gap) => gap.to !== id);
  const fallback = heir ?? steps[0]?.id ?? '';
  const keep = (name: string) => (name === id ? fallback : name);
  return dropEmptyVisits({
    ...body,
    steps,
    gaps,
    factGaps,
    deadlines: body.deadlines.filter((deadline) => deadline.step !== id),
    timingAnchor: keep(body.timingAnchor),
    serviceStep: keep(body.serviceStep),
  });
}

function dropEmptyVisits(body: ProtocolBody): ProtocolBody {
  const used = new Set(body.steps.map((step) => step.visit));
  return { ...body, visits: body.visits.filter((visit) => used.has(visit.id)) };
}

/** Moves a step to just before or after its neighbour in the same visit; at the end nothing changes. */
export function shiftStep(body: ProtocolBody, id: string, by: -1 | 1): ProtocolBody {
  const index = body.steps.findIndex((step) => step.id === id);
  const step = body.steps[index];
  const other = body.steps[index + by];
  if (!step || !other || other.visit !== step.visit) return body;
  const steps = [...body.steps];
  steps[index] = other;
  steps[index + by] = step;
  return { ...body, steps };
}
