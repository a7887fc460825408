import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';

import { call } from '@/lib/api';
import { newId } from '@/lib/ids';
import type { CallInput } from '@/shared/routes';
import { keys } from './keys';

export const useProperty = (propertyId: string) =>
  useQuery({
    queryKey: keys.property(propertyId),
    queryFn: () => call('GET /api/properties/:propertyId', { params: { propertyId } }),
    enabled: propertyId !== '',
  });

export const usePeople = (propertyId: string) =>
  useQuery({
    queryKey: keys.people(propertyId),
    queryFn: () => call('GET /api/properties/:propertyId/people', { params: { propertyId } }),
    enabled: propertyId !== '',
  });

export type NewInvitation = Omit<CallInput<'POST /api/properties/:propertyId/invitations'>['body'], 'id'>;

/** Invite, withdraw an invitation, end a membership. */
export function usePeopleActions(propertyId: string) {
  const client = useQueryClient();
  const onSuccess = () => client.invalidateQueries({ queryKey: keys.people(propertyId) });
  return {
    invite: useMutation({
      mutationFn: (body: NewInvitation) =>
        call('POST /api/properties/:propertyId/invitations', {
          params: { propertyId },
          body: { id: newId(), ...body },
        }),
      onSuccess,
    }),
    withdraw: useMutation({
      mutationFn: (invitationId: string) =>
        call('DELETE /api/property-invitations/:invitationId', { params: { invitationId } }),
      onSuccess,
    }),
    end: useMutation({
      mutationFn: (membershipId: string) => call('DELETE /api/memberships/:membershipId', { params: { membershipId } }),
      onSuccess,
    }),
  };
}
