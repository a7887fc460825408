import { compose } from '@/server/mail/compose';
import type { Mail } from '@/server/mail/transport';

import { claimMessage, type ClaimedMessage } from '../claim';
import type { JobContext } from '../context';
import { begin, closeUnknown, release, settleLater, settleRefused, settleSent, settleUnsent } from '../settle';

const isReminder = (message: ClaimedMessage): boolean =>
  message.kind !== 'invitation' && message.kind !== 'passwordReset';

const unknownAnswer = (message: ClaimedMessage): string =>
  isReminder(message)
    ? 'the mail server was given the text and its answer was never learnt: not repeated'
    : 'the mail server was given the text and its answer was never learnt: repeated with the same Message-ID';

/** Sends what is due, one message after another, until nothing is due or the worker stops. */
export async function sendMessages(context: JobContext): Promise<void> {
  while (!context.stopping()) {
    const message = await claimMessage(context);
    if (!message) return;
    try {
      await deliver(context, message);
    } catch (error) {
      // a message that can't be written must not keep the others waiting
      context.deps.log.error({ err: error, message: message.id }, 'message not delivered');
      await settleRefused(context, message, null, `not written: ${String(error)}`);
    }
  }
}

async function deliver(context: JobContext, message: ClaimedMessage): Promise<void> {
  if (message.unknownBefore) {
    await closeUnknown(context, message, unknownAnswer(message));
    if (isReminder(message)) return settleUnsent(context, message, 'failed');
  }
  if (message.staleAt && message.staleAt <= context.deps.now())
    return settleUnsent(context, message, message.attempts > 0 ? 'failed' : 'withdrawn');
  const composed = await compose(context.deps, message);
  if ('nothing' in composed) return settleUnsent(context, message, 'withdrawn');
  if ('later' in composed) return settleLater(context, message, composed.later);
  return send(context, message, composed.mail, composed.told);
}

/** True when the mail server itself said no; false when the connection ended without an answer. */
const isAnswer = (error: unknown): boolean =>
  typeof error === 'object' && error !== null && 'responseCode' in error && typeof error.responseCode === 'number';

async function send(
  context: JobContext,
  message: ClaimedMessage,
  mail: Mail,
  told: Record<string, string>,
): Promise<void> {
  const intent: { attempt: string | null; lost: boolean } = { attempt: null, lost: false };
  let answer: string;
  try {
    answer = await context.mail.send(mail, async () => {
      intent.attempt = await begin(context, message);
      intent.lost = intent.attempt === null;
      if (intent.lost) throw new Error('claim lost or message withdrawn');
    });
  } catch (error) {
    if (intent.lost) return release(context, message);
    return settleError(context, message, intent.attempt, error);
  }
  if (intent.attempt === null) throw new Error('a transport that sends without asking breaks the promise of claim.ts');
  return settleSent(context, message, intent.attempt, answer, told);
}

async function settleError(
  context: JobContext,
  message: ClaimedMessage,
  attempt: string | null,
  error: unknown,
): Promise<void> {
  const unknown = attempt !== null && !isAnswer(error);
  context.deps.log.warn({ message: message.id, kind: message.kind, unknown, reason: String(error) }, 'mail not taken');
  if (!unknown) return settleRefused(context, message, attempt, String(error));
  if (!isReminder(message)) return settleRefused(context, message, attempt, unknownAnswer(message));
  await closeUnknown(context, message, unknownAnswer(message));
  return settleUnsent(context, message, 'failed');
}
