import { afterEach, describe, expect, it } from 'vitest';

import { smtpTransport, type Mail } from '@/server/mail/transport';
import { freePort, startMailDev, startScriptedSmtp, type Ending } from './mailServer';

const mail: Mail = {
  id: '0b1f8f0e-6a5a-4a4e-9d0c-0a1f6f1c7d11',
  to: 'crew@example.org',
  subject: 'Tue 6 Oct: Device out',
  text: 'Device out at 07:00\n',
  html: '<p>Device out at 07:00</p>\n',
};
const transportTo = (smtpUrl: string) =>
  smtpTransport({ smtpUrl, from: 'Yardbell <yardbell@example.org>', publicUrl: 'https://yards.example.org' });

describe('mail transport', () => {
  let close: () => Promise<void> = async () => undefined;
  afterEach(async () => {
    await close();
    close = async () => undefined;
  });

  it('sends text and HTML with the headers that mail programs look for', async () => {
    const server = await startMailDev();
    close = server.close;
    await transportTo(server.smtpUrl).send(mail, async () => undefined);
    const [caught] = await server.mails();
    expect(caught?.subject).toBe(mail.subject);
    expect(caught?.text.trim()).toBe('Device out at 07:00');
    expect(caught?.html).toContain('<p>Device out at 07:00</p>');
    expect(caught?.to.map((one) => one.address)).toEqual(['crew@example.org']);
    expect(caught?.from).toEqual([{ address: 'yardbell@example.org', name: 'Yardbell' }]);
    expect(caught?.headers['message-id']).toBe(`<${mail.id}@yards.example.org>`);
    expect(caught?.headers['list-unsubscribe']).toBe('<https://yards.example.org/more>');
    expect(caught?.headers['auto-submitted']).toBe('auto-generated');
  });

  it('keeps line breaks in what people typed out of the headers and out of the recipients', async () => {
    const server = await startMailDev();
    close = server.close;
    const evil = {
      ...mail,
      subject: 'A\r\nBcc: thief@example.org\r\n\r\nbody',
      to: 'crew@example.org\r\nBcc: thief@example.org',
    };
    await transportTo(server.smtpUrl).send({ ...evil, to: mail.to }, async () => undefined);
    const [caught] = await server.mails();
    expect(caught?.headers['bcc']).toBeUndefined();
    expect(caught?.subject).toBe('A Bcc: thief@example.org body');
    await transportTo(server.smtpUrl)
      .send(evil, async () => undefined)
      .catch(() => undefined);
    for (const one of await server.mails()) expect(one.to.map((to) => to.address)).not.toContain('thief@example.org');
  });

  const conversation = async (ending: Ending) => {
    const server = await startScriptedSmtp(() => ending);
    close = server.close;
    let asked = 0;
    const sent = transportTo(server.smtpUrl).send(mail, async () => {
      asked += server.texts.length === 0 ? 1 : 100;
    });
    const error: unknown = await sent.then(
      () => null,
      (reason: unknown) => reason,
    );
    return {
      asked,
      texts: server.texts.length,
      code: (error as { responseCode?: number } | null)?.responseCode,
      failed: error !== null,
    };
  };

  it('asks before the first byte of the text, once', async () => {
    expect(await conversation('take')).toEqual({ asked: 1, texts: 1, code: undefined, failed: false });
  });

  it('does not ask when the server refuses the recipient', async () => {
    expect(await conversation('refuseRecipient')).toEqual({ asked: 0, texts: 0, code: 550, failed: true });
  });

  it('does not ask when the server hangs up before it agrees to take the text', async () => {
    expect(await conversation('hangUpAtData')).toEqual({ asked: 0, texts: 0, code: undefined, failed: true });
  });

  it('tells a refusal of the text from a connection that broke after it', async () => {
    expect(await conversation('refuseText')).toEqual({ asked: 1, texts: 1, code: 554, failed: true });
    await close();
    expect(await conversation('hangUpAfterText')).toEqual({ asked: 1, texts: 1, code: undefined, failed: true });
  });

  it('gives no text away when the question is answered with no', async () => {
    const server = await startScriptedSmtp(() => 'take');
    close = server.close;
    await expect(transportTo(server.smtpUrl).send(mail, () => Promise.reject(new Error('claim lost')))).rejects.toThrow(
      'claim lost',
    );
    expect(server.texts).toEqual([]);
  });

  it('fails when nobody listens', async () => {
    const port = await freePort();
    await expect(
      transportTo(`smtp://127.0.0.1:${port}?ignoreTLS=true`).send(mail, async () => undefined),
    ).rejects.toThrow('ECONNREFUSED');
  });
});
