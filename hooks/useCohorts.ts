import { useInfiniteQuery, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';

import { call } from '@/lib/api';
import { newId } from '@/lib/ids';
import type { CallInput } from '@/shared/routes';
import { keys } from './keys';

export const useCohorts = (propertyId: string | null) =>
  useInfiniteQuery({
    queryKey: keys.cohorts(propertyId),
    initialPageParam: null as string | null,
    queryFn: ({ pageParam }) =>
      call('GET /api/cohorts', {
        query: { limit: 50, ...(propertyId ? { propertyId } : {}), ...(pageParam ? { after: pageParam } : {}) },
      }),
    getNextPageParam: (last) => last.next,
  });

export const useCohort = (cohortId: string) =>
  useQuery({
    queryKey: keys.cohort(cohortId),
    queryFn: () => call('GET /api/cohorts/:cohortId', { params: { cohortId } }),
    enabled: cohortId !== '',
  });

/** What starting the cohort would make. Asked anew whenever the cohort's revision changes. */
export const usePlan = (cohortId: string, revision: number, enabled: boolean) =>
  useQuery({
    queryKey: keys.plan(cohortId, revision),
    queryFn: () => call('GET /api/cohorts/:cohortId/plan', { params: { cohortId } }),
    enabled,
    placeholderData: (previous) => previous,
    staleTime: 0,
  });

export const useAudit = (cohortId: string, enabled: boolean) =>
  useQuery({
    queryKey: keys.audit(cohortId),
    queryFn: () => call('GET /api/cohorts/:cohortId/audit', { params: { cohortId }, query: { limit: 100 } }),
    enabled,
  });

/** A change of plan shows everywhere: lists, Today, calendar, the herd's cohort column. */
function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: keys.program() });
}

export type CohortPatch = CallInput<'PATCH /api/cohorts/:cohortId'>['body'];

export function useCreateCohort() {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (input: { propertyId: string; body: CallInput<'POST /api/properties/:propertyId/cohorts'>['body'] }) =>
      call('POST /api/properties/:propertyId/cohorts', { params: { propertyId: input.propertyId }, body: input.body }),
    onSuccess: refresh,
  });
}

export function useSaveCohort(cohortId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: CohortPatch) => call('PATCH /api/cohorts/:cohortId', { params: { cohortId }, body }),
    onSuccess: (cohort) => {
      client.setQueryData(keys.cohort(cohortId), cohort);
      // the herd shows which animals are taken
      void client.invalidateQueries({ queryKey: keys.herd() });
      return client.invalidateQueries({ queryKey: keys.cohortLists() });
    },
  });
}

export function useStartCohort(cohortId: string) {
  const client = useQueryClient();
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (body: { fingerprint: string; revision: number }) =>
      call('POST /api/cohorts/:cohortId/start', { params: { cohortId }, body }),
    onSuccess: (cohort) => {
      client.setQueryData(keys.cohort(cohortId), cohort);
      return refresh();
    },
    // refused because the plan is another now: fetch that one, so that it can be looked at
    onError: refresh,
  });
}

export function useCancelCohort(cohortId: string) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (reason: string) =>
      call('POST /api/cohorts/:cohortId/cancel', { params: { cohortId }, body: { reason } }),
    onSuccess: refresh,
  });
}

export const useMovePreview = (taskId: string) =>
  useMutation({
    mutationFn: (body: { dueLocal: string; revision: number }) =>
      call('POST /api/tasks/:taskId/move/preview', { params: { taskId }, body }),
  });

export function useMove(taskId: string) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (body: { dueLocal: string; revision: number }) =>
      call('POST /api/tasks/:taskId/move', { params: { taskId }, body }),
    onSuccess: refresh,
  });
}

export function useAuthorise(cohortId: string) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (body: Omit<CallInput<'POST /api/cohorts/:cohortId/authorities'>['body'], 'id'>) =>
      call('POST /api/cohorts/:cohortId/authorities', { params: { cohortId }, body: { id: newId(), ...body } }),
    onSuccess: refresh,
  });
}
