import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';

import { call } from '@/lib/api';
import { newId } from '@/lib/ids';
import type { CallInput } from '@/shared/routes';
import { keys } from './keys';

export const useMedicines = (propertyId: string) =>
  useQuery({
    queryKey: keys.medicines(propertyId),
    queryFn: () => call('GET /api/properties/:propertyId/medicines', { params: { propertyId } }),
    enabled: propertyId !== '',
  });

export function useMedicineActions(propertyId: string) {
  const client = useQueryClient();
  const refresh = () => client.invalidateQueries({ queryKey: keys.program() });
  return {
    addProduct: useMutation({
      mutationFn: (body: Omit<CallInput<'POST /api/properties/:propertyId/products'>['body'], 'id'>) =>
        call('POST /api/properties/:propertyId/products', { params: { propertyId }, body: { id: newId(), ...body } }),
      onSuccess: refresh,
    }),
    addBatch: useMutation({
      mutationFn: (body: Omit<CallInput<'POST /api/properties/:propertyId/product-batches'>['body'], 'id'>) =>
        call('POST /api/properties/:propertyId/product-batches', {
          params: { propertyId },
          body: { id: newId(), ...body },
        }),
      onSuccess: refresh,
    }),
    withdraw: useMutation({
      mutationFn: (authorityId: string) =>
        call('POST /api/authorities/:authorityId/withdraw', { params: { authorityId } }),
      onSuccess: refresh,
    }),
  };
}
