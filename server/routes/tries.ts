import { failure } from '../http/errors';

const perMinute = 10;
const most = 10_000;
const tries = new Map<string, { since: number; count: number }>();

/**
 * Limits guesses at one person's password, from however many addresses. Kept in this process: with several servers
 * each allows its own share. Counts unknown people alike, so that being limited tells nothing.
 */
export function withinTries(email: string, now: Date): void {
  const at = now.getTime();
  const found = tries.get(email);
  const current = found && at - found.since < 60_000 && at >= found.since ? found : { since: at, count: 0 };
  current.count += 1;
  if (tries.size > most) tries.clear();
  tries.set(email, current);
  if (current.count > perMinute) throw failure('tooMany', 'server.tooMany');
}
