import { mkdtemp, rm } from 'node:fs/promises';
import { createRequire } from 'node:module';
import net from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';

interface MailDevServer {
  listen(done: (error?: Error) => void): void;
  close(): Promise<void>;
}
interface CaughtMail {
  subject: string;
  text: string;
  html: string;
  from: { address: string; name: string }[];
  to: { address: string }[];
  headers: Record<string, string>;
}

export const freePort = (): Promise<number> =>
  new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const address = server.address();
      server.close(() =>
        address && typeof address === 'object' ? resolve(address.port) : reject(new Error('no port')),
      );
    });
  });

/** A real mail catcher on free ports. */
export async function startMailDev(): Promise<{
  smtpUrl: string;
  mails(): Promise<CaughtMail[]>;
  close(): Promise<void>;
}> {
  const MailDev = createRequire(import.meta.url)('maildev') as new (options: Record<string, unknown>) => MailDevServer;
  const [smtp, web] = [await freePort(), await freePort()];
  const mailDirectory = await mkdtemp(path.join(tmpdir(), 'mail-'));
  const maildev = new MailDev({ smtp, web, ip: '127.0.0.1', webIp: '127.0.0.1', silent: true, mailDirectory });
  await new Promise<void>((resolve, reject) => maildev.listen((error) => (error ? reject(error) : resolve())));
  // it keeps what earlier catchers of the same process caught
  await fetch(`http://127.0.0.1:${web}/email/all`, { method: 'DELETE' });
  return {
    smtpUrl: `smtp://127.0.0.1:${smtp}?ignoreTLS=true`,
    mails: async () => (await (await fetch(`http://127.0.0.1:${web}/email`)).json()) as CaughtMail[],
    close: async () => {
      await maildev.close();
      await rm(mailDirectory, { recursive: true, force: true });
    },
  };
}

/** Where a scripted SMTP server (RFC 5321) ends the conversation. */
export type Ending = 'refuseRecipient' | 'refuseText' | 'hangUpAtData' | 'hangUpAfterText' | 'take';

/** A small SMTP server that answers as told, after some milliseconds, and keeps the texts it was given. */
export async function startScriptedSmtp(
  ending: () => Ending,
  delay = 0,
): Promise<{ smtpUrl: string; texts: string[]; close(): Promise<void> }> {
  const texts: string[] = [];
  const sockets = new Set<net.Socket>();
  const server = net.createServer((socket) => {
    sockets.add(socket);
    socket.on('error', () => undefined);
    converse(socket, ending, texts, delay);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  const port = address && typeof address === 'object' ? address.port : 0;
  return {
    smtpUrl: `smtp://127.0.0.1:${port}?ignoreTLS=true`,
    texts,
    close: () =>
      new Promise((resolve) => {
        sockets.forEach((socket) => socket.destroy());
        server.close(() => resolve());
      }),
  };
}

function converse(socket: net.Socket, ending: () => Ending, texts: string[], delay: number): void {
  let text: string | null = null;
  const say = (line: string) => socket.write(`${line}\r\n`);
  say('220 test');
  socket.on('data', (chunk) => {
    if (text !== null) {
      text += chunk.toString();
      if (!text.endsWith('\r\n.\r\n')) return;
      texts.push(text);
      text = null;
      if (ending() === 'hangUpAfterText') socket.destroy();
      else setTimeout(() => say(ending() === 'refuseText' ? '554 not this' : '250 taken'), delay);
      return;
    }
    const command = chunk.toString().slice(0, 4).toUpperCase();
    if (command === 'RCPT' && ending() === 'refuseRecipient') say('550 nobody here');
    else if (command === 'DATA' && ending() === 'hangUpAtData') socket.destroy();
    else if (command === 'DATA') {
      text = '';
      say('354 go on');
    } else if (command === 'QUIT') socket.end('221 bye\r\n');
    else say('250 ok');
  });
}
