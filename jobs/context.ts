import type { planReminders } from '@/server/commands/planReminders';
import type { MailTransport } from '@/server/mail/transport';

/** What the commands work with: database, settings, log and clock. */
export type Deps = Parameters<typeof planReminders>[0];

/** What a task of the worker works with. */
export interface JobContext {
  deps: Deps;
  mail: MailTransport;
  /** Name of this worker, for the rows it holds. */
  worker: string;
  /** True when the worker has been asked to stop: finish what is in hand and begin nothing new. */
  stopping(): boolean;
}
