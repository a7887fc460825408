import type { Gap, Item, Step } from '@/protocols/types';
import { t, tData } from '@/shared/messages';
import { duration } from '@/shared/when';

/** Words for the parts of a protocol, from the one catalogue. */

export const stepName = (step: Step, locale?: string): string =>
  step.label ?? tData(`step.${step.kind}`, step.kind, {}, locale);

const figure = (n: number): string => String(Math.round(n * 100) / 100).replace('-', '−');

/** `GnRH 100 µg, into muscle`: an amount that is missing is said, not left out. */
export function itemWords(item: Item): string {
  const unit = tData(
    item.amount === 1 || item.amount === undefined ? `unit.${item.unit}` : `unitMany.${item.unit}`,
    tData(`unit.${item.unit}`, item.unit),
  );
  const per = item.per === 'kg' ? t('protocols.perKg') : '';
  const route = tData(`route.${item.route}`, item.route);
  if (item.unit === 'device' || item.unit === 'patch') return `${figure(item.amount ?? 1)} ${unit}, ${route}`;
  const amount = item.amount === undefined ? t('protocols.amountMissing') : `${figure(item.amount)} ${unit}${per}`;
  return `${tData(`active.${item.active}`, item.active)} ${amount}, ${route}`;
}

/** One bound as it stands in the table: `7 d`, `52 h`, `−`. */
export function boundWords(gap: Gap, bound: 'least' | 'ideal' | 'most'): string {
  const value = gap[bound];
  if (value === undefined) return '–';
  if (gap.unit === 'elapsedHours') return `${figure(value)} h`;
  if (gap.unit === 'milkings') return t('protocols.milkings', { count: value });
  const tolerance = gap.toleranceMinutes ?? 0;
  const days = `${figure(value)} d`;
  if (bound === 'ideal' || tolerance === 0) return gap.clock && bound === 'ideal' ? `${days} ${gap.clock}` : days;
  return `${days} ${bound === 'least' ? '−' : '+'} ${duration(tolerance)}`;
}

/** The whole gap in words: `54 h elapsed, 52 to 56` or `7 days, same clock hour, give or take 1 h`. */
export function gapWords(gap: Gap): string {
  const { least, most } = gap;
  const ideal = gap.ideal ?? least ?? most ?? 0;
  if (gap.unit === 'localDays') {
    const clock = gap.clock ? t('protocols.atClock', { clock: gap.clock }) : t('protocols.sameClock');
    const give = gap.toleranceMinutes ? `, ${t('protocols.giveOrTake', { time: duration(gap.toleranceMinutes) })}` : '';
    const range =
      least !== undefined && most !== undefined && least !== most
        ? `${figure(least)} ${t('protocols.to')} ${figure(most)}`
        : figure(ideal);
    return `${t('protocols.days', { count: ideal, range })}, ${clock}${give}`;
  }
  if (gap.unit === 'milkings') return t('protocols.milkings', { count: ideal });
  const main = t('protocols.hoursElapsed', { hours: figure(ideal) });
  if (least !== undefined && most !== undefined)
    return least === most ? main : `${main}, ${figure(least)} ${t('protocols.to')} ${figure(most)}`;
  if (least !== undefined) return `${main}, ${t('protocols.atLeast', { hours: figure(least) })}`;
  if (most !== undefined) return `${main}, ${t('protocols.atMost', { hours: figure(most) })}`;
  return main;
}

export { conditionWords } from '@/shared/conditions';

/** Short form for the line: `GnRH 100 µg`. */
export function shortStep(step: Step): string {
  const item = step.items[0];
  const name = stepName(step);
  if (!item || item.amount === undefined || item.unit === 'device' || item.unit === 'patch') return name;
  return `${name} ${figure(item.amount)} ${tData(`unit.${item.unit}`, item.unit)}`;
}
