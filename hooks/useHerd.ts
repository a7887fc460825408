import { useInfiniteQuery, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';

import type { AnimalClass } from '@/protocols/types';
import { call } from '@/lib/api';
import type { Animal, ImportRequest } from '@/shared/contracts/herd';
import { keys } from './keys';

export interface HerdFilter {
  search: string;
  class: AnimalClass | null;
  available?: boolean;
}

const query = (filter: HerdFilter) => ({
  ...(filter.search.trim() ? { search: filter.search.trim() } : {}),
  ...(filter.class ? { class: filter.class } : {}),
  ...(filter.available ? { available: 'yes' as const } : {}),
});

/** Animals of a property by tag, page by page. */
export const useAnimals = (propertyId: string, filter: HerdFilter) =>
  useInfiniteQuery({
    queryKey: keys.animals(propertyId, filter),
    initialPageParam: null as string | null,
    queryFn: ({ pageParam }) =>
      call('GET /api/properties/:propertyId/animals', {
        params: { propertyId },
        query: { ...query(filter), limit: 100, ...(pageParam ? { after: pageParam } : {}) },
      }),
    getNextPageParam: (last) => last.next,
    enabled: propertyId !== '',
    placeholderData: (previous) => previous,
  });

/** Every animal that matches, all pages, for choosing whole mobs. */
export async function allAnimals(propertyId: string, filter: HerdFilter): Promise<Animal[]> {
  const found: Animal[] = [];
  let after: string | null = null;
  do {
    const page: { items: Animal[]; next: string | null } = await call('GET /api/properties/:propertyId/animals', {
      params: { propertyId },
      query: { ...query(filter), limit: 200, ...(after ? { after } : {}) },
    });
    found.push(...page.items);
    after = page.next;
  } while (after);
  return found;
}

export const useAnimal = (animalId: string) =>
  useQuery({
    queryKey: keys.animal(animalId),
    queryFn: () => call('GET /api/animals/:animalId', { params: { animalId } }),
  });

export function useSaveAnimal(animalId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (patch: Record<string, unknown>) =>
      call('PATCH /api/animals/:animalId', { params: { animalId }, body: patch as never }),
    onSuccess: (animal) => {
      client.setQueryData(keys.animal(animalId), animal);
      return client.invalidateQueries({ queryKey: keys.herd() });
    },
  });
}

export const useImportPreview = (propertyId: string) =>
  useMutation({
    mutationFn: (request: ImportRequest) =>
      call('POST /api/properties/:propertyId/animal-imports/preview', { params: { propertyId }, body: request }),
  });

export function useImport(propertyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (request: ImportRequest) =>
      call('POST /api/properties/:propertyId/animal-imports', { params: { propertyId }, body: request }),
    onSuccess: () => client.invalidateQueries({ queryKey: keys.herd() }),
  });
}
