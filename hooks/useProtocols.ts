import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';

import type { ProtocolBody } from '@/protocols/types';
import { call } from '@/lib/api';
import { newId } from '@/lib/ids';
import { keys } from './keys';

export const useLibrary = () =>
  useQuery({ queryKey: keys.library(), queryFn: () => call('GET /api/library', {}), staleTime: Infinity });

export const useLibraryProtocol = (libraryId: string) =>
  useQuery({
    queryKey: keys.libraryProtocol(libraryId),
    queryFn: () => call('GET /api/library/:libraryId', { params: { libraryId } }),
    staleTime: Infinity,
  });

export const useProtocols = () =>
  useQuery({ queryKey: keys.protocols(), queryFn: () => call('GET /api/protocols', {}) });

export const useProtocol = (protocolId: string) =>
  useQuery({
    queryKey: keys.protocol(protocolId),
    queryFn: () => call('GET /api/protocols/:protocolId', { params: { protocolId } }),
  });

export const useVersion = (versionId: string) =>
  useQuery({
    queryKey: keys.version(versionId),
    queryFn: () => call('GET /api/protocol-versions/:versionId', { params: { versionId } }),
    enabled: versionId !== '',
  });

/** Everything about protocols is asked for anew after a change: lists, versions and the planner's choice. */
function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: keys.allProtocols() });
}

export function useCreateProtocol() {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (input: { organisationId: string; name: string; libraryId?: string }) =>
      call('POST /api/protocols', {
        body: {
          id: newId(),
          versionId: newId(),
          organisationId: input.organisationId,
          name: input.name,
          ...(input.libraryId ? { from: { libraryId: input.libraryId } } : {}),
        },
      }),
    onSuccess: refresh,
  });
}

export function useSaveVersion(versionId: string) {
  const client = useQueryClient();
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (input: { revision: number; body: ProtocolBody }) =>
      call('PUT /api/protocol-versions/:versionId', { params: { versionId }, body: input as never }),
    onSuccess: (version) => {
      client.setQueryData(keys.version(versionId), version);
      return refresh();
    },
  });
}

export function useSignOff(versionId: string) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (revision: number) =>
      call('POST /api/protocol-versions/:versionId/sign-off', { params: { versionId }, body: { revision } }),
    onSuccess: refresh,
  });
}

export function useVersionActions(versionId: string, protocolId: string) {
  const refresh = useRefresh();
  return {
    discard: useMutation({
      mutationFn: () => call('DELETE /api/protocol-versions/:versionId', { params: { versionId } }),
      onSuccess: refresh,
    }),
    retire: useMutation({
      mutationFn: () => call('POST /api/protocol-versions/:versionId/retire', { params: { versionId } }),
      onSuccess: refresh,
    }),
    openNext: useMutation({
      mutationFn: () =>
        call('POST /api/protocols/:protocolId/working-copies', { params: { protocolId }, body: { id: newId() } }),
      onSuccess: refresh,
    }),
  };
}
