import { localOf } from '@/shared/when';

/** A property of the demo where it is daytime now, so that a program can begin at once whatever the hour of the run. */
const places = [
  { name: 'Brindle Gap', zone: 'Australia/Sydney', manager: 'manager@brindlegap.example' },
  { name: 'Ballywhin', zone: 'Europe/Dublin', manager: 'manager@ballywhin.example' },
  { name: 'Heron Slough', zone: 'America/New_York', manager: 'manager@heronslough.example' },
];

export function dayPlace(now: number) {
  const hour = (zone: string) => Number(localOf(now, zone).slice(11, 13));
  const found = places.find(({ zone }) => hour(zone) >= 4 && hour(zone) <= 20);
  if (!found) throw new Error('no place of the demo has day now');
  return found;
}

const minute = 60_000;
/** Wall-clock time at a place, some minutes from now. */
export const localIn = (now: number, minutes: number, zone: string): string => localOf(now + minutes * minute, zone);
