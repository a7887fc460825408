import { useEffect, useState } from 'react';

import { t } from '@/shared/messages';
import { duration } from '@/shared/when';
import { Text, type TextProps } from './Text';

/** The time now in epoch milliseconds, asked anew every `ms`, and at once when the page comes back into view. */
export function useNow(ms = 30_000): number {
  const [now, setNow] = useState(() => Date.now());
  useEffect(() => {
    const look = () => setNow(Date.now());
    const timer = setInterval(look, ms);
    document.addEventListener('visibilitychange', look);
    return () => {
      clearInterval(timer);
      document.removeEventListener('visibilitychange', look);
    };
  }, [ms]);
  return now;
}

/** `in 1 h 05`, `now`, or `20 min ago`. Both in epoch milliseconds. */
export function leftWords(until: number, now: number): string {
  const minutes = Math.round((until - now) / 60_000);
  if (minutes === 0) return t('ui.now');
  return minutes > 0 ? t('ui.in', { time: duration(minutes) }) : t('ui.ago', { time: duration(-minutes) });
}

/** Time to an instant, going down by itself. */
export const TimeLeft = ({ until, ...text }: { until: number } & Omit<TextProps, 'children'>) => (
  <Text {...text}>{leftWords(until, useNow())}</Text>
);
