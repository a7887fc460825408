import type { Active, AdministrationRoute, AnimalClass, DoseUnit, Item, ProtocolBody, Step } from '../types';
import { holds, resolveOptions } from './conditions';

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

/** What a step gives to a number of head of one class. */
export const dosesOf = (step: Step, animalClass: AnimalClass, head: number, weightKg?: number): Dose[] =>
  step.items.map((item) => {
    const amount = amountFor(item, animalClass, weightKg);
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
      const times = step.repeat?.count ?? 1;
      for (const dose of dosesOf(step, group.class, group.head)) {
        const key = [dose.active, dose.amount, dose.unit, dose.route, group.class].join('|');
        const need = needs.get(key) ?? { ...pick(dose), class: group.class, doses: 0, steps: [] };
        need.doses += group.head * times;
        if (!need.steps.includes(step.id)) need.steps.push(step.id);
        needs.set(key, need);
      }
    }
  }
  return [...needs.values()];
}

const pick = ({ active, amount, unit, route }: Dose) => ({ active, amount, unit, route });
