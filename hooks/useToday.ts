import { useQuery } from '@tanstack/react-query';

import { call } from '@/lib/api';
import { keys } from './keys';

/** Today's work at every place, or at one; asks again each minute while the page is open. */
export const useToday = (propertyId: string | null) =>
  useQuery({
    queryKey: keys.today(propertyId),
    queryFn: () => call('GET /api/today', { query: propertyId ? { propertyId } : {} }),
    refetchInterval: 60_000,
    refetchOnMount: 'always',
    staleTime: 0,
  });

/** Tasks and holidays between two local dates, both included. */
export const useCalendar = (from: string, to: string, propertyId: string | null) =>
  useQuery({
    queryKey: keys.calendar(from, to, propertyId),
    queryFn: () => call('GET /api/calendar', { query: { from, to, ...(propertyId ? { propertyId } : {}) } }),
    placeholderData: (previous) => previous,
  });
