import { holds } from '@/protocols/plan/conditions';
import type { Condition } from '@/protocols/types';
import type { TaskStep } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';

type Dose = TaskStep['doses'][number];

const figure = (n: number): string => String(Math.round(n * 100) / 100);
const unitWord = (dose: Dose, n: number): string =>
  tData(n === 1 ? `unit.${dose.unit}` : `unitMany.${dose.unit}`, tData(`unit.${dose.unit}`, dose.unit));

/** `5 mL (25 mg dinoprost), into muscle`: what the hand needs first, then what it is. */
export function doseWords(dose: Dose): string {
  const active = tData(`active.${dose.active}`, dose.active);
  const amount =
    dose.amount === null ? t('protocols.amountMissing') : `${figure(dose.amount)} ${unitWord(dose, dose.amount)}`;
  const route = tData(`route.${dose.route}`, dose.route);
  const piece = dose.unit === 'device' || dose.unit === 'patch';
  if (piece) return `${amount}, ${route}`;
  return dose.volume
    ? `${dose.volume} (${amount} ${active.toLowerCase()}), ${route}`
    : `${amount} ${active.toLowerCase()}, ${route}`;
}

/** `156 devices in all`; null when nobody can know. */
export const totalWords = (dose: Dose): string | null =>
  dose.total === null ? null : t('task.total', { amount: `${figure(dose.total)} ${unitWord(dose, dose.total)}` });

/** Short form for a list: `25 mg`, `1 device`. */
export const shortDose = (step: TaskStep): string | null => {
  const dose = step.doses[0];
  if (!dose || dose.amount === null || dose.unit === 'device' || dose.unit === 'patch') return null;
  return dose.volume ?? `${figure(dose.amount)} ${unitWord(dose, dose.amount)}`;
};

/** Steps that an animal gets, once it was looked at; without a look those of every branch. */
export const stepsFor = (steps: readonly TaskStep[], observed: Record<string, string>): TaskStep[] =>
  steps.filter((step) => holds(step.when as Condition | undefined, { observed }) !== false);

/** Each caution once, in the order of the steps. */
export const cautionsOf = (steps: readonly TaskStep[]): string[] => [
  ...new Set(steps.flatMap((step) => step.cautions)),
];
