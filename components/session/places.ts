import type { Href } from 'expo-router';

import type { Ability } from '@/shared/abilities';
import type { MessageKey } from '@/shared/messages';
import type { PlaceName } from '../ui/marks/glyphs';

export interface Place {
  name: PlaceName;
  href: Href & string;
  word: MessageKey;
  /** What the person needs at some place; absent: everybody. */
  ability?: Ability;
  /** Beginnings of the addresses that belong to it besides its own. */
  also?: readonly string[];
}

const today: Place = { name: 'today', href: '/', word: 'nav.today', ability: 'work.read', also: ['/task'] };
const cohorts: Place = { name: 'cohorts', href: '/cohorts', word: 'nav.cohorts', ability: 'cohort.read' };
const calendar: Place = { name: 'calendar', href: '/calendar', word: 'nav.calendar', ability: 'calendar.read' };
const protocols: Place = { name: 'protocols', href: '/protocols', word: 'nav.protocols', ability: 'protocol.read' };
const herd: Place = { name: 'herd', href: '/herd', word: 'nav.herd', ability: 'herd.read' };
const medicines: Place = { name: 'medicines', href: '/medicines', word: 'nav.medicines', ability: 'medicine.read' };
const people: Place = { name: 'people', href: '/people', word: 'nav.people' };
const more: Place = { name: 'more', href: '/more', word: 'nav.more', also: ['/calendar', '/medicines', '/people'] };

/** Left rail. */
export const wideNavigation: readonly Place[] = [today, cohorts, calendar, protocols, herd, medicines, people];
/** Bottom bar; the rest is under More. */
export const phoneNavigation: readonly Place[] = [today, cohorts, protocols, herd, more];
export const underMore: readonly Place[] = [calendar, medicines, people];

const within = (pathname: string, start: string): boolean => pathname === start || pathname.startsWith(`${start}/`);

/** True when the address belongs to the place. */
export const isCurrent = (place: Place, pathname: string): boolean =>
  (place.href === '/' ? pathname === '/' : within(pathname, place.href)) ||
  (place.also ?? []).some((start) => within(pathname, start));

export const openTo = (places: readonly Place[], can: (ability: Ability) => boolean): Place[] =>
  places.filter((place) => place.ability === undefined || can(place.ability));
