import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';

import { call } from '@/lib/api';
import { newId } from '@/lib/ids';
import { keys } from './keys';

export const useCalendarLinks = () =>
  useQuery({ queryKey: keys.calendarLinks(), queryFn: () => call('GET /api/calendar-links') });

/** Make, replace, revoke. The answers of the first two hold the secret address, which is in no list and in no cache. */
export function useCalendarLinkActions() {
  const client = useQueryClient();
  const onSuccess = () => client.invalidateQueries({ queryKey: keys.calendarLinks() });
  return {
    make: useMutation({
      mutationFn: (body: { label: string; propertyId: string | null }) =>
        call('POST /api/calendar-links', { body: { id: newId(), ...body } }),
      onSuccess,
      gcTime: 0,
    }),
    replace: useMutation({
      mutationFn: (linkId: string) => call('POST /api/calendar-links/:linkId/replace', { params: { linkId } }),
      onSuccess,
      gcTime: 0,
    }),
    revoke: useMutation({
      mutationFn: (linkId: string) => call('DELETE /api/calendar-links/:linkId', { params: { linkId } }),
      onSuccess,
    }),
  };
}
