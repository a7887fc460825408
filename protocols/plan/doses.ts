import type { Active, AdministrationRoute, AnimalClass, DoseUnit, Item, ProtocolBody, Step } from '../types';
import { holds, resolveOptions } from './conditions';
import { countOf } from './occurrences';

export interface Dose {
  stepId: string;
  active: Active;
  /** Per head in `unit`; null: the source names none and the vet has not written it, or it goes by weight unknown. */
  amount: number | null;
  unit: DoseUnit;
  route: AdministrationRoute;
  /** For all head; null with `amount`. */
  total: number | null;
}

/** Amount of an item for one animal. Per-kg items need the weight. */
export function amountFor(item: Item, animalClass: AnimalClass, weightKg?: number): number | null {
  const amount = item.byClass?.[animalClass] ?? item.amount;
  if (amount === undefined) return null;
  if (item.per === 'head') return amount;
  return weightKg === undefined ? null : amount * weightKg;
}

/** What a step gives to a number of head of one class, in the given occurrence (from 1) of a repeated act. */
export const dosesOf = (
  step: Step,
  animalClass: AnimalClass,
  head: number,
  weightKg?: number,
  occurrence = 1,
): Dose[] =>
  step.items.map((item, i) => {
    // a table of amounts (FSH, falling from day to day) is that of the step's first item
    const listed = i === 0 ? step.repeat?.amounts?.[occurrence - 1] : undefined;
    const amount = listed ?? amountFor(item, animalClass, weightKg);
    return {
      stepId: step.id,
      active: item.active,
      amount,
      unit: item.unit,
      route: item.route,
      total: amount === null ? null : amount * head,
    };
  });

export interface Need {
  active: Active;
  amount: number | null;
  unit: DoseUnit;
  route: AdministrationRoute;
  class: AnimalClass;
  /** Doses, counting each step of every animal: twice the head when it is given twice. */
  doses: number;
  /** Amount of all doses in `unit`; null with `amount`. */
  total: number | null;
  steps: string[];
}

/**
 * What a program needs for its groups: one line for each active, amount and class. A step of a branch counts for
 * all head, since who will be in it is not known before.
 */
export function requirements(
  body: ProtocolBody,
  groups: readonly { class: AnimalClass; head: number }[],
  options?: Readonly<Record<string, string>>,
): Need[] {
  const chosen = resolveOptions(body, options);
  const needs = new Map<string, Need>();
  for (const group of groups) {
    for (const step of body.steps) {
      if (holds(step.when, { options: chosen, class: group.class }) === false) continue;
      for (let n = 1; n <= countOf(step.repeat); n += 1)
        for (const dose of dosesOf(step, group.class, group.head, undefined, n)) add(needs, dose, group);
    }
  }
  return [...needs.values()];
}

function add(needs: Map<string, Need>, dose: Dose, group: { class: AnimalClass; head: number }): void {
  const key = [dose.active, dose.amount, dose.unit, dose.route, group.class].join('|');
  const need = needs.get(key) ?? { ...pick(dose), class: group.class, doses: 0, total: null, steps: [] };
  need.doses += group.head;
  need.total = need.amount === null ? null : need.amount * need.doses;
  if (!need.steps.includes(dose.stepId)) need.steps.push(dose.stepId);
  needs.set(key, need);
}

export interface ActiveTotal {
  active: Active;
  unit: DoseUnit;
  doses: number;
  /** Null when the amount of one of its doses is not known. */
  total: number | null;
}

/** One line for each active (and unit) over all classes: what has to be ordered. */
export function totalsByActive(needs: readonly Need[]): ActiveTotal[] {
  const totals = new Map<string, ActiveTotal>();
  for (const { active, unit, doses, total } of needs) {
    const key = `${active}|${unit}`;
    const sum = totals.get(key);
    if (sum) {
      sum.doses += doses;
      sum.total = sum.total === null || total === null ? null : sum.total + total;
    } else totals.set(key, { active, unit, doses, total });
  }
  return [...totals.values()];
}

const pick = ({ active, amount, unit, route }: Dose) => ({ active, amount, unit, route });
