import { schedule as wakeAt } from 'node-cron';

import { claimTurn } from './claim';
import type { JobContext } from './context';
import { schedule, type Job } from './schedule';

export interface Worker {
  /** Does what is due now; resolves when done. A call while it is awake joins the round that runs. */
  wake(): Promise<void>;
  /** Finishes the message in hand and resolves. */
  stop(): Promise<void>;
}

/**
 * A worker: node-cron only wakes it, the database decides what is due. A missed waking heals at the next one.
 * `wakeSeconds` null: nobody wakes it but the caller.
 */
export function startWorker(
  base: Omit<JobContext, 'stopping'>,
  wakeSeconds: number | null,
  jobs: readonly Job[] = schedule,
): Worker {
  let stopped = false;
  let round: Promise<void> | null = null;
  const context: JobContext = { ...base, stopping: () => stopped };
  const wake = (): Promise<void> => {
    if (stopped) return round ?? Promise.resolve();
    round ??= runDue(context, jobs).finally(() => {
      round = null;
    });
    return round;
  };
  const cron = wakeSeconds === null ? null : wakeAt(expression(wakeSeconds), wake, { timezone: 'Etc/UTC' });
  return {
    wake,
    async stop() {
      stopped = true;
      await cron?.destroy();
      await round;
    },
  };
}

/** Every so many seconds; whole minutes from 60 on. */
export const expression = (seconds: number): string =>
  seconds < 60
    ? `*/${Math.max(1, Math.round(seconds))} * * * * *`
    : `0 */${Math.min(59, Math.round(seconds / 60))} * * * *`;

async function runDue(context: JobContext, jobs: readonly Job[]): Promise<void> {
  for (const job of jobs) {
    if (context.stopping()) return;
    try {
      if (job.every === 'wake' || (await claimTurn(context, job.name, job.every))) await job.run(context);
    } catch (error) {
      // the next waking tries again; one job in trouble keeps no other waiting
      context.deps.log.error({ err: error, job: job.name }, 'job failed');
    }
  }
}
