import { useQuery } from '@tanstack/react-query';

import { call } from '@/lib/api';
import type { Ability } from '@/shared/abilities';
import type { Me, PropertySummary } from '@/shared/contracts/people';
import { keys } from './keys';

/** The person signed in, with places and what they may do there. Fails with `unauthenticated` when nobody is. */
export const useMe = () => useQuery({ queryKey: keys.me(), queryFn: () => call('GET /api/me'), staleTime: 60_000 });

/** True when the person has the ability at any place, or at the one named. */
export const hasAbility = (me: Me | undefined, ability: Ability, placeId?: string): boolean =>
  me !== undefined &&
  [...me.properties, ...me.organisations].some(
    (place) => (placeId === undefined || place.id === placeId) && place.abilities.includes(ability),
  );

/** `const can = useCan(); can('cohort.plan', propertyId)` — for showing what may be done; the server judges. */
export function useCan() {
  const { data } = useMe();
  return (ability: Ability, placeId?: string): boolean => hasAbility(data, ability, placeId);
}

/** The property of an id, when the person may see it. */
export const propertyOf = (me: Me | undefined, propertyId: string | null | undefined): PropertySummary | undefined =>
  me?.properties.find((property) => property.id === propertyId);
