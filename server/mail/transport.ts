import { Readable } from 'node:stream';

import { createTransport, type MailMessage, type SendMailOptions } from 'nodemailer';

import { headerValue, messageIdOf } from './headers';
import type { Rendered } from './page';

export interface Mail extends Rendered {
  /** Id of the outbox row: the Message-ID is made of it. */
  id: string;
  to: string;
}

export interface MailTransport {
  /**
   * Gives one mail to the mail server and resolves with its answer once it has taken it.
   * `beforeText` runs when the server has agreed to take the text, and before the first byte of it leaves: until then
   * the mail surely hasn't gone out. When it rejects, the connection is dropped and the mail doesn't go.
   */
  send(mail: Mail, beforeText: () => Promise<void>): Promise<string>;
  close(): void;
}

export interface MailSettings {
  smtpUrl: string;
  from: string;
  publicUrl: string;
}

/**
 * Holds the text back until somebody reads: nodemailer begins to read after the server's 354 answer to DATA
 * (RFC 5321 section 3.3), so the first read is the moment before the first byte.
 */
function heldBack(input: Readable, beforeText: () => Promise<void>): Readable {
  return Readable.from(
    (async function* () {
      await beforeText();
      yield* input;
    })(),
    { objectMode: false },
  );
}

/** Mail by SMTP, one connection a mail: a pool would repeat a mail below the outbox when a connection closes. */
export function smtpTransport(settings: MailSettings): MailTransport {
  const transporter = createTransport(
    {
      url: settings.smtpUrl,
      connectionTimeout: 10_000,
      greetingTimeout: 10_000,
      socketTimeout: 30_000,
      disableFileAccess: true,
      disableUrlAccess: true,
    },
    { from: headerValue(settings.from) },
  );
  const waiting = new Map<string, () => Promise<void>>();
  transporter.use('stream', (mail: MailMessage, done: (error?: Error | null) => void) => {
    const beforeText = waiting.get(String(mail.data.messageId));
    if (beforeText) mail.message.processFunc((input) => heldBack(input, beforeText));
    done();
  });
  return {
    async send(mail, beforeText) {
      const messageId = messageIdOf(mail.id, settings.publicUrl);
      waiting.set(messageId, beforeText);
      try {
        const options: SendMailOptions = {
          messageId,
          to: { name: '', address: headerValue(mail.to, 254) },
          subject: headerValue(mail.subject),
          text: mail.text,
          html: mail.html,
          headers: {
            'Auto-Submitted': 'auto-generated',
            'List-Unsubscribe': `<${settings.publicUrl}/more>`,
          },
        };
        const info = await transporter.sendMail(options);
        return String(info.response);
      } finally {
        waiting.delete(messageId);
      }
    },
    close: () => transporter.close(),
  };
}
