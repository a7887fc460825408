/** Writes times for people, always in the property's own zone, with weekday and month name so that no order misleads. */

const cache = new Map<string, Intl.DateTimeFormat>();
function formatter(locale: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = locale + JSON.stringify(options);
  let made = cache.get(key);
  if (!made) {
    made = new Intl.DateTimeFormat(locale, options);
    cache.set(key, made);
  }
  return made;
}

/** `2026-10-06T07:00` in the zone; instants in epoch milliseconds. */
export function localOf(at: number, zone: string): string {
  const parts = formatter('en-CA', {
    timeZone: zone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
  }).formatToParts(at);
  const part = (type: string) => parts.find((p) => p.type === type)?.value ?? '';
  return `${part('year')}-${part('month')}-${part('day')}T${part('hour')}:${part('minute')}`;
}

/** `07:00`: the yards read a 24-hour clock. */
export const clock = (at: number, zone: string): string => localOf(at, zone).slice(11);

/** `Tue 6 Oct`, with the year when asked. */
export function day(at: number, zone: string, locale = 'en-AU', year = false): string {
  const parts = formatter(locale, {
    timeZone: zone,
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    ...(year ? { year: 'numeric' } : {}),
  }).formatToParts(at);
  const part = (type: string) => parts.find((p) => p.type === type)?.value ?? '';
  return `${part('weekday')} ${part('day')} ${part('month')}${year ? ` ${part('year')}` : ''}`;
}

/** `Tue 6 Oct 07:00`. */
export const dayClock = (at: number, zone: string, locale = 'en-AU'): string =>
  `${day(at, zone, locale)} ${clock(at, zone)}`;

/** Short name of the zone at that moment, such as `AEDT` or `GMT+11`. */
export const zoneName = (at: number, zone: string, locale = 'en-AU'): string =>
  formatter(locale, { timeZone: zone, timeZoneName: 'short' })
    .formatToParts(at)
    .find((p) => p.type === 'timeZoneName')?.value ?? zone;

/** `54 h`, `6 d 23 h`, `1 h 05`, `20 min`: figures first, no more than two units. Negative values keep their sign. */
export function duration(minutes: number): string {
  const sign = minutes < 0 ? '−' : '';
  const total = Math.round(Math.abs(minutes));
  const days = Math.floor(total / 1440);
  const hours = Math.floor((total % 1440) / 60);
  const rest = total % 60;
  if (days >= 4) return `${sign}${days} d${hours ? ` ${hours} h` : ''}`;
  const allHours = Math.floor(total / 60);
  if (allHours >= 1) return `${sign}${allHours} h${rest ? ` ${String(rest).padStart(2, '0')}` : ''}`;
  return `${sign}${rest} min`;
}
