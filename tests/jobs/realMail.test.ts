import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import { sendMessages } from '@/jobs/tasks/sendMessages';
import { planReminders } from '@/server/commands/planReminders';
import { smtpTransport } from '@/server/mail/transport';
import { startMailDev, startScriptedSmtp } from '../server/mailServer';
import { addGroup, addPerson, addProperty, addTask, jobContext, openYard, outbox, type Yard } from './kit';

const publicUrl = 'http://localhost:3000';

describe('reminders through a real mail server', () => {
  let yard: Yard;
  beforeAll(async () => {
    yard = await openYard();
  });
  afterAll(() => yard.close());
  beforeEach(async () => {
    await yard.reset('2026-10-01T00:00:00Z');
  });

  const planOne = async (zone: string, locale: string, due: string) => {
    const property = await addProperty(yard, zone, 'Gully Flat\r\nBcc: thief@example.org', locale);
    const person = await addPerson(yard, property, 'staff', 'true, true, true');
    const task = await addTask(yard, property, await addGroup(yard, property), { due });
    await yard.deps.sequelize.transaction((tx) => planReminders(yard.deps, tx, property, [task]));
    return { person, task };
  };

  it('arrive once from two workers, say times in the zone of the property, and carry no foreign header', async () => {
    const server = await startMailDev();
    const mail = smtpTransport({ smtpUrl: server.smtpUrl, from: 'Yardbell <yardbell@example.org>', publicUrl });
    try {
      // Dublin: winter time begins on Sun 25 Oct 2026 at 01:00 UTC (IANA time zone database)
      const { person, task } = await planOne('Europe/Dublin', 'en-IE', '2026-10-25T07:00:00Z');
      for (const moment of ['2026-10-24T17:00:00Z', '2026-10-25T05:30:00Z', '2026-10-25T08:00:00Z']) {
        yard.clock.at = new Date(moment);
        await Promise.all([sendMessages(jobContext(yard, mail, 'w1')), sendMessages(jobContext(yard, mail, 'w2'))]);
      }
      const caught = await server.mails();
      expect(caught.map((one) => one.subject)).toEqual([
        'Sun 25 Oct: Device out · Group 1 at Gully Flat Bcc: thief@example.org',
        'Due Sun 25 Oct: Device out · Group 1 at Gully Flat Bcc: thief@example.org',
        'Window closes 09:00: Device out, 60 head not done at Gully Flat Bcc: thief@example.org',
      ]);
      for (const one of caught) {
        expect(one.to.map((to) => to.address)).toEqual([person.email]);
        expect(one.headers['bcc']).toBeUndefined();
        expect(one.text).toContain('07:00 Device out · Group 1 · 60 head');
        expect(one.text).toContain('Window Sun 25 Oct 05:00 GMT to 09:00 GMT');
        expect(one.text).toContain('Cloprostenol 500 µg a head, into muscle · 30 mg in all');
        expect(one.html).toContain(`${publicUrl}/task/${task}`);
      }
    } finally {
      mail.close();
      await server.close();
    }
  });

  it('are not repeated when the server hung up after the text, and are when it hung up before', async () => {
    let ending: 'hangUpAtData' | 'hangUpAfterText' | 'take' = 'hangUpAtData';
    const server = await startScriptedSmtp(() => ending);
    const mail = smtpTransport({ smtpUrl: server.smtpUrl, from: 'yardbell@example.org', publicUrl });
    try {
      await planOne('Australia/Sydney', 'en-AU', '2026-10-05T20:00:00Z');
      const at = async (moment: string, next: typeof ending) => {
        ending = next;
        yard.clock.at = new Date(moment);
        await sendMessages(jobContext(yard, mail));
      };
      await at('2026-10-05T07:00:00Z', 'hangUpAtData');
      expect(server.texts).toHaveLength(0);
      await at('2026-10-05T07:01:00Z', 'take');
      expect(server.texts).toHaveLength(1);
      await at('2026-10-05T18:30:00Z', 'hangUpAfterText');
      await at('2026-10-05T19:30:00Z', 'take');
      expect(server.texts).toHaveLength(2);
      expect((await outbox(yard)).map((row) => row['state'])).toEqual(['sent', 'failed', 'waiting']);
    } finally {
      mail.close();
      await server.close();
    }
  });
});
