import { randomUUID } from 'node:crypto';

import { QueryTypes } from 'sequelize';

import type { ClaimedMessage } from './claim';
import type { JobContext } from './context';

/** Minutes until the next try, by the number of tries that failed; after the last one the message has failed. */
export const backOffMinutes = [1, 5, 15, 60] as const;

const BEGUN = 'begun';
const answerWords = (answer: string): string => answer.replace(/\s+/g, ' ').slice(0, 500);

/** Commits the intent to hand the text over, and gives its attempt; null when this claim may no longer send (claim.ts). */
export async function begin(context: JobContext, message: ClaimedMessage): Promise<string | null> {
  const { deps } = context;
  const rows = await deps.sequelize.query<{ id: string }>(
    `with held as (
       select id from messages where id = :message and claimed_by = :claim and state = 'waiting' and due_at <= :now for update)
     insert into delivery_attempts (id, message_id, at, ok, answer) select :id, id, :now, false, '${BEGUN}' from held
     returning id`,
    {
      type: QueryTypes.SELECT,
      replacements: { id: randomUUID(), message: message.id, claim: message.claim, now: deps.now() },
    },
  );
  return rows[0]?.id ?? null;
}

/** The mail server took it; `told` keeps what it said of each task, for when that changes. Said even when another worker gave this claim up meanwhile: it is a fact. */
export async function settleSent(
  context: JobContext,
  message: ClaimedMessage,
  attempt: string,
  answer: string,
  told: Record<string, string> = {},
): Promise<void> {
  const { deps } = context;
  await deps.sequelize.transaction(async (transaction) => {
    await deps.sequelize.query('update delivery_attempts set ok = true, answer = :answer where id = :attempt', {
      replacements: { attempt, answer: answerWords(answer) },
      transaction,
    });
    await deps.sequelize.query(
      `update messages set state = 'sent', sent_at = :now, claimed_by = null, claimed_until = null, updated_at = now(),
         params = (params - 'link') || :params::jsonb
       where id = :id`,
      {
        replacements: {
          id: message.id,
          now: deps.now(),
          params: JSON.stringify(Object.keys(told).length > 0 ? { told } : {}),
        },
        transaction,
      },
    );
  });
}

/** It surely did not go out: tries again later, and gives up after the last back-off or when it is stale by then. */
export async function settleRefused(
  context: JobContext,
  message: ClaimedMessage,
  attempt: string | null,
  answer: string,
): Promise<void> {
  const { deps } = context;
  const minutes = backOffMinutes[message.attempts];
  const next = minutes === undefined ? null : new Date(deps.now().getTime() + minutes * 60_000);
  const over = next === null || (message.staleAt !== null && next >= message.staleAt);
  await deps.sequelize.transaction(async (transaction) => {
    await deps.sequelize.query(
      `insert into delivery_attempts (id, message_id, at, ok, answer) values (:attempt, :message, :now, false, :answer)
       on conflict (id) do update set answer = excluded.answer`,
      {
        replacements: {
          attempt: attempt ?? randomUUID(),
          message: message.id,
          now: deps.now(),
          answer: answerWords(answer),
        },
        transaction,
      },
    );
    await deps.sequelize.query(
      `update messages set attempts = attempts + 1, state = :state, next_try_at = coalesce(:next, next_try_at),
         claimed_by = null, claimed_until = null, updated_at = now()
       where id = :id and claimed_by = :claim and state = 'waiting'`,
      { replacements: { id: message.id, claim: message.claim, state: over ? 'failed' : 'waiting', next }, transaction },
    );
  });
}

/** Ends a message without sending it, or after an answer that never came. */
export async function settleUnsent(
  context: JobContext,
  message: ClaimedMessage,
  state: 'withdrawn' | 'failed',
): Promise<void> {
  await context.deps.sequelize.query(
    `update messages set state = :state, claimed_by = null, claimed_until = null, updated_at = now()
     where id = :id and claimed_by = :claim and state = 'waiting'`,
    { replacements: { id: message.id, claim: message.claim, state } },
  );
}

/** Gives the row back untouched. */
export async function release(context: JobContext, message: ClaimedMessage): Promise<void> {
  await context.deps.sequelize.query(
    'update messages set claimed_by = null, claimed_until = null where id = :id and claimed_by = :claim',
    { replacements: { id: message.id, claim: message.claim } },
  );
}

/** Its moment has moved: waits for it. */
export async function settleLater(context: JobContext, message: ClaimedMessage, at: Date): Promise<void> {
  await context.deps.sequelize.query(
    `update messages set due_at = :at, next_try_at = :at, claimed_by = null, claimed_until = null, updated_at = now()
     where id = :id and claimed_by = :claim and state = 'waiting'`,
    { replacements: { id: message.id, claim: message.claim, at } },
  );
}

/** Closes attempts whose outcome nobody will learn. */
export async function closeUnknown(context: JobContext, message: ClaimedMessage, answer: string): Promise<void> {
  await context.deps.sequelize.query(
    `update delivery_attempts set answer = :answer where message_id = :id and answer = '${BEGUN}'`,
    { replacements: { id: message.id, answer } },
  );
}
