import { addDays } from '@/protocols/time/dates';
import type { AnimalClass, LocalDate } from '@/protocols/types';
import { Animal } from '../models';
import { demoId } from './ids';

interface Mob {
  propertyId: string;
  /** First tag and how many. */
  from: number;
  count: number;
  width: number;
  class: AnimalClass;
  breed: string;
  paddock: string;
  today: LocalDate;
  /** Days ago that they were born, and calved last, spread over the mob. */
  bornDaysAgo: number;
  calvedDaysAgo?: { from: number; to: number };
  knownEmpty: boolean | null;
  eids?: string;
}

export const tagOf = (n: number, width: number): string => String(n).padStart(width, '0');
export const animalId = (propertyId: string, tag: string): string => demoId(`${propertyId} ${tag}`);

/** A fixed spread, so that a mob looks like a mob and is the same each time. */
const spread = (i: number, from: number, to: number): number => from + ((i * 37) % (to - from + 1));

/** Makes the animals of a mob and gives their ids, in order of tag. */
export async function seedMob(mob: Mob): Promise<string[]> {
  const animals = Array.from({ length: mob.count }, (_, i) => {
    const tag = tagOf(mob.from + i, mob.width);
    return {
      id: animalId(mob.propertyId, tag),
      propertyId: mob.propertyId,
      tag,
      // a manufacturer code that the ISO 11784 register leaves for tests: 999 and fifteen figures in all
      eid: mob.eids ? `${mob.eids}${String(mob.from + i).padStart(15 - mob.eids.length, '0')}` : null,
      class: mob.class,
      breed: mob.breed,
      birth: addDays(mob.today, -mob.bornDaysAgo - spread(i, 0, 40)),
      lastCalving: mob.calvedDaysAgo
        ? addDays(mob.today, -spread(i, mob.calvedDaysAgo.from, mob.calvedDaysAgo.to))
        : null,
      knownEmpty: mob.knownEmpty,
      weightKg: mob.class === 'heifer' ? spread(i, 305, 355) : null,
      condition: spread(i, 5, 7) / 2,
      paddock: mob.paddock,
      state: 'present' as const,
    };
  });
  await Animal.bulkCreate(animals, {
    fields: [
      'id',
      'propertyId',
      'tag',
      'eid',
      'class',
      'breed',
      'birth',
      'lastCalving',
      'knownEmpty',
      'weightKg',
      'condition',
      'paddock',
      'state',
    ],
  });
  return animals.map((animal) => animal.id);
}
