import type { JobContext } from './context';
import { beat } from './tasks/beat';
import { cleanUp } from './tasks/cleanUp';
import { planAhead } from './tasks/planAhead';
import { sendMessages } from './tasks/sendMessages';

export interface Job {
  name: string;
  /** Seconds between two turns, all workers together; `wake`: every worker, each time it wakes. */
  every: number | 'wake';
  run: (context: JobContext) => Promise<void>;
}

/** The one list of what runs when, in this order at each waking. */
export const schedule: readonly Job[] = [
  { name: 'beat', every: 'wake', run: beat },
  { name: 'planAhead', every: 10 * 60, run: planAhead },
  { name: 'sendMessages', every: 'wake', run: sendMessages },
  { name: 'cleanUp', every: 24 * 60 * 60, run: cleanUp },
];
