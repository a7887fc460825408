import { randomUUID } from 'node:crypto';

import { QueryTypes } from 'sequelize';

import type { OutboxMessage } from '@/server/mail/compose';
import type { JobContext } from './context';

/**
 * Claims: how any number of workers share one outbox, and what "once" means.
 *
 * - A row is claimed in one statement (`for update skip locked`) with a lease, so two workers never take the same one.
 *   Leases and intervals are measured by the database's clock, the only one that all workers share; whether a message
 *   is due is measured by the worker's.
 * - Before the first byte of a mail's text leaves, an intent is committed, and only if the claim is still held, the row
 *   still waits and its moment still stands. A worker that lost its lease, or whose message was withdrawn meanwhile,
 *   can't get past that point. Until then nothing has gone out and a repeat is safe.
 * - From the intent until the mail server's answer nobody can know whether it took the mail. When that answer never
 *   comes (a crash, a dropped connection), a reminder is NOT repeated: it is marked failed and its attempt says why.
 *   The morning mail, the closing mail and the calendar still stand, and a crew that is told twice of one job learns to
 *   ignore mail. An invitation or a password reset IS repeated, with the same Message-ID: losing one locks a person
 *   out, and its link works once however often it is mailed.
 */
export const LEASE_SECONDS = 120;

export interface ClaimedMessage extends OutboxMessage {
  /** Names this very claim: a later claim of the same row has another. */
  claim: string;
  attempts: number;
  staleAt: Date | null;
  /** An earlier attempt gave the text to the mail server and never learnt the outcome. */
  unknownBefore: boolean;
}

/** Takes the next message that is due, or null. */
export async function claimMessage(context: JobContext, leaseSeconds = LEASE_SECONDS): Promise<ClaimedMessage | null> {
  const { deps, worker } = context;
  const claim = `${worker}/${randomUUID()}`;
  const rows = await deps.sequelize.query<Omit<ClaimedMessage, 'claim'>>(
    `update messages m set claimed_by = :claim, claimed_until = clock_timestamp() + make_interval(secs => :leaseSeconds)
     where m.id = (
       select id from messages
       where state = 'waiting' and next_try_at <= :now and due_at <= :now and (claimed_until is null or claimed_until <= clock_timestamp())
       order by next_try_at, id limit 1 for update skip locked)
     returning m.id, m.kind, m.user_id as "userId", m.address, m.task_id as "taskId", m.property_id as "propertyId",
       m.params, m.attempts, m.stale_at as "staleAt",
       exists (select from delivery_attempts a where a.message_id = m.id and a.answer = 'begun') as "unknownBefore"`,
    { type: QueryTypes.SELECT, replacements: { claim, leaseSeconds, now: deps.now() } },
  );
  return rows[0] ? { ...rows[0], claim } : null;
}

/**
 * True for one worker in each interval, whatever the number of workers and restarts; at once when the last time is
 * longer ago, so that a worker that was down catches up first.
 */
export async function claimTurn(context: JobContext, name: string, everySeconds: number): Promise<boolean> {
  const rows = await context.deps.sequelize.query(
    `insert into worker_beats (name, at) values (:name, clock_timestamp())
     on conflict (name) do update set at = excluded.at
     where worker_beats.at <= excluded.at - make_interval(secs => :everySeconds) or worker_beats.at > excluded.at
     returning name`,
    { type: QueryTypes.SELECT, replacements: { name: `turn:${name}`, everySeconds } },
  );
  return rows.length > 0;
}
