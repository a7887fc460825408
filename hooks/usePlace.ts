import { useSyncExternalStore } from 'react';

import { readKept, writeKept } from '@/lib/keep';
import type { Ability } from '@/shared/abilities';
import { propertyOf, useMe } from './useMe';

const key = 'place';
const listeners = new Set<() => void>();
const subscribe = (listener: () => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};
const chosen = (): string | null => readKept<string | null>(key) ?? null;

/** Chooses a property for every place of the program, or all of them (null). Kept on this device. */
export function choosePlace(propertyId: string | null): void {
  writeKept(key, propertyId);
  listeners.forEach((listener) => listener());
}

/** What the switcher says: one property, or all places (null). `propertyId` is ready for queries that take null for all. */
export function usePlace() {
  const { data } = useMe();
  const id = useSyncExternalStore(subscribe, chosen);
  const properties = data?.properties ?? [];
  const only = properties.length === 1 ? properties[0] : undefined;
  const property = propertyOf(data, id) ?? only ?? null;
  return { propertyId: property?.id ?? null, property, properties, choose: choosePlace };
}

/**
 * For places that show one property at a time (herd, medicines, people): the chosen one when the ability holds there,
 * else the first where it does; null where it holds nowhere.
 */
export function useOneProperty(ability: Ability) {
  const { property, properties, choose } = usePlace();
  const open = properties.filter((one) => one.abilities.includes(ability));
  return { property: open.find((one) => one.id === property?.id) ?? open[0] ?? null, properties: open, choose };
}
