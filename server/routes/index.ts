import type { RouteName } from '@/shared/routes';
import type { Handlers } from '../http/handler';
import { calendarLinkHandlers } from './calendarLinks';
import { cohortHandlers } from './cohorts';
import { herdHandlers } from './herd';
import { peopleHandlers } from './people';
import { protocolHandlers } from './protocols';
import { sessionHandlers } from './session';
import { systemHandlers } from './system';
import { workHandlers } from './work';

/** A handler for every route of the table: one that is missing does not compile. */
export const handlers: Handlers<RouteName> = {
  ...systemHandlers,
  ...sessionHandlers,
  ...peopleHandlers,
  ...calendarLinkHandlers,
  ...protocolHandlers,
  ...herdHandlers,
  ...cohortHandlers,
  ...workHandlers,
};
