import type { DoseUnit } from '@/protocols/types';
import { cautionsOf } from '@/shared/cautions';
import type { TaskStep } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';
import { clock, day, dayClock, duration, zoneName } from '@/shared/when';

import type { TellableTask } from '../queries/tellableTasks';

/** Figures of doses are never rounded for show; only the noise of binary fractions goes. */
const figure = (value: number): string => String(Number(value.toPrecision(12)));

/** Totals in the unit that people weigh and order in. */
function inLargerUnit(total: number, unit: DoseUnit): { total: number; unit: DoseUnit } {
  if (unit === 'ug' && total >= 1000) return inLargerUnit(total / 1000, 'mg');
  if (unit === 'mg' && total >= 1000) return { total: total / 1000, unit: 'g' };
  return { total, unit };
}

function doseWords(dose: TaskStep['doses'][number], locale: string): string {
  const what = tData(`active.${dose.active}`, dose.active, {}, locale);
  const route = tData(`route.${dose.route}`, dose.route, {}, locale);
  const unitOf = (amount: number, unit: DoseUnit): string => {
    const one = tData(`unit.${unit}`, unit, {}, locale);
    return amount === 1 ? one : tData(`unitMany.${unit}`, one, {}, locale);
  };
  if (dose.amount === null) return t('telling.doseVaries', { what, route }, locale);
  const words = t(
    'telling.dose',
    { what, amount: figure(dose.amount), unit: unitOf(dose.amount, dose.unit), route },
    locale,
  );
  if (dose.total === null) return words;
  const all = inLargerUnit(dose.total, dose.unit);
  return t('telling.doseTotal', { dose: words, total: figure(all.total), unit: unitOf(all.total, all.unit) }, locale);
}

/** One line a step: what is done, in which branch, what is given and how much of it. */
export const stepLines = (task: TellableTask): string[] =>
  task.steps.map((step) => {
    const name = step.label || tData(`step.${step.kind}`, step.kind, {}, task.locale);
    const doses = (step.doses ?? []).map((dose) => doseWords(dose, task.locale));
    return [step.condition ? `${name} (${step.condition})` : name, ...doses].join(': ');
  });

/** `Tue 6 Oct 06:00 AEDT to 09:00 AEDT`; the zone stands at both ends, for a clock may change in between. */
export function windowLine(task: TellableTask): string {
  const { zone, locale } = task;
  const from = task.windowFrom.getTime();
  const to = task.windowTo.getTime();
  const sameDay = day(from, zone, locale, true) === day(to, zone, locale, true);
  return t(
    'telling.window',
    {
      from: `${dayClock(from, zone, locale)} ${zoneName(from, zone, locale)}`,
      to: `${sameDay ? clock(to, zone) : dayClock(to, zone, locale)} ${zoneName(to, zone, locale)}`,
    },
    locale,
  );
}

/** Cautions of all steps, each once, the one about label, law and vet last. */
export function cautionLines(task: TellableTask): string[] {
  const keys = new Set(task.steps.flatMap((step) => (step.cautions?.length ? step.cautions : cautionsOf(step.kind))));
  keys.delete('label');
  return [...keys, 'label'].map((key) => tData(`caution.${key}`, '', {}, task.locale)).filter((line) => line !== '');
}

export const headWords = (count: number, locale: string): string => t('telling.head', { count }, locale);

/** `Device out · Group 1 · 156 head`. */
export const taskSummary = (task: TellableTask): string =>
  [task.title, task.group, headWords(task.head, task.locale)].join(' · ');

/** `54 h from the timing anchor`; null where nothing was counted from an anchor. */
export const sinceLine = (task: TellableTask): string | null =>
  task.sinceAnchorMinutes === null || task.sinceAnchorMinutes === 0
    ? null
    : t('telling.since', { duration: duration(task.sinceAnchorMinutes) }, task.locale);
