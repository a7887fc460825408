import { t, tData } from '@/shared/messages';

/** An amount without more than two decimals. */
export const rounded = (amount: number): number => Math.round(amount * 100) / 100;

/** `25 mg`, `1 device`. */
export const amountWords = (amount: number, unit: string): string =>
  `${rounded(amount)} ${tData(amount === 1 ? `unit.${unit}` : `unitMany.${unit}`, tData(`unit.${unit}`, unit))}`;

/** `meat 1 day, milk as the label says`. */
export const withholdWords = (meatDays: number | null, milkHours: number | null): string =>
  t('medicines.withhold', {
    meat: meatDays === null ? t('medicines.byLabel') : t('medicines.daysN', { count: meatDays }),
    milk: milkHours === null ? t('medicines.byLabel') : t('medicines.hoursN', { count: milkHours }),
  });

/** Whole days from one local date to another. */
export const daysUntil = (date: string, today: string): number =>
  Math.round((Date.parse(`${date}T00:00:00Z`) - Date.parse(`${today}T00:00:00Z`)) / 86_400_000);
