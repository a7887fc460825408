import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';

import { call } from '@/lib/api';
import { forgetAllKept, readKept, writeKept } from '@/lib/keep';
import type { Me } from '@/shared/contracts/people';
import type { CallInput } from '@/shared/routes';
import { forgetAnswers } from './client';
import { keys } from './keys';

/** Whose answers and forms are on this device. */
const owner = 'owner';

/** Takes the person in. What another person left on this device goes first. */
export function useArrive() {
  const client = useQueryClient();
  return async (me: Me) => {
    if (readKept<string>(owner) !== me.user.id) {
      forgetAllKept();
      await forgetAnswers();
    }
    client.removeQueries();
    writeKept(owner, me.user.id);
    client.setQueryData(keys.me(), me);
  };
}

export function useSignIn() {
  const arrive = useArrive();
  return useMutation({
    mutationFn: (body: CallInput<'POST /api/session'>['body']) => call('POST /api/session', { body }),
    onSuccess: arrive,
  });
}

/** Ends the session, then forgets everything on this device. Without an answer nothing is forgotten: the session still stands. */
export function useSignOut() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => call('DELETE /api/session'),
    onSuccess: async () => {
      forgetAllKept();
      client.clear();
      await forgetAnswers();
    },
  });
}

export const useAskReset = () =>
  useMutation({ mutationFn: (email: string) => call('POST /api/password-resets', { body: { email } }) });

export const useSetPassword = (token: string) =>
  useMutation({
    mutationFn: (password: string) =>
      call('POST /api/password-resets/:token', { params: { token }, body: { password } }),
  });

export const useInvitation = (token: string) =>
  useQuery({
    queryKey: keys.invitation(token),
    queryFn: () => call('GET /api/invitations/:token', { params: { token } }),
    staleTime: Infinity,
    gcTime: 0,
  });

export function useAcceptInvitation(token: string) {
  const arrive = useArrive();
  return useMutation({
    mutationFn: (body: CallInput<'POST /api/invitations/:token'>['body']) =>
      call('POST /api/invitations/:token', { params: { token }, body }),
    onSuccess: arrive,
  });
}

/** Own name and reminders. */
export function useSaveMe() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: CallInput<'PATCH /api/me'>['body']) => call('PATCH /api/me', { body }),
    onSuccess: (me) => client.setQueryData(keys.me(), me),
  });
}
