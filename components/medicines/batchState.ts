import { t } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { localOf } from '@/shared/when';
import { dateWords } from '../herd/words';
import { daysUntil } from './words';

type Medicines = Output<'GET /api/properties/:propertyId/medicines'>;
export type Batch = Medicines['batches'][number];
export type Product = Medicines['products'][number];

/** Days before its expiry from which a product batch is marked. */
const soon = 30;

interface BatchState {
  mark: 'stop' | 'warn' | null;
  /** Why it is marked; empty without a mark. */
  warning: string;
  /** When it was opened, and until when it is good then. */
  opened: string[];
}

const laterDate = (date: string, days: number): string =>
  new Date(Date.parse(`${date}T12:00:00Z`) + days * 86_400_000).toISOString().slice(0, 10);

/** Whether a product batch may still be used, judged by local dates: its expiry, and how long it has been open. */
export function batchState(batch: Batch, product: Product | undefined, zone: string, today: string): BatchState {
  const left = daysUntil(batch.expiry, today);
  const openedOn = batch.broachedAt ? localOf(Date.parse(batch.broachedAt), zone).slice(0, 10) : null;
  const openDays = product?.openDays ?? null;
  const openUntil = openedOn && openDays !== null ? laterDate(openedOn, openDays) : null;
  const opened = [
    ...(openedOn ? [t('medicines.broached', { day: dateWords(openedOn) })] : []),
    ...(openUntil ? [t('medicines.useBy', { day: dateWords(openUntil) })] : []),
  ];
  if (left < 0) return { mark: 'stop', warning: t('medicines.pastExpiry'), opened };
  if (openUntil && openUntil < today) {
    const time = t('medicines.daysN', { count: openDays ?? 0 });
    return { mark: 'stop', warning: t('medicines.openTooLong', { time }), opened };
  }
  if (left === 0) return { mark: 'warn', warning: t('medicines.expiresToday'), opened };
  if (left > soon) return { mark: null, warning: '', opened };
  return {
    mark: 'warn',
    warning: t('medicines.expiresSoon', { time: t('medicines.daysN', { count: left }) }),
    opened,
  };
}
