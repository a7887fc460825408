import { describe, expect, it } from 'vitest';

import { accountMail } from '@/server/mail/accountMail';
import { headerValue, messageIdOf } from '@/server/mail/headers';
import { closingMoment, eveningMoment, localInstant, morningMoment } from '@/server/mail/moments';
import { escapeHtml, render } from '@/server/mail/render';

const iso = (at: number) => new Date(at).toISOString();

describe('mail headers', () => {
  it('hold no control character whatever is put in', () => {
    for (let code = 0; code < 32; code += 1) expect(headerValue(`a${String.fromCharCode(code)}b`)).toBe('a b');
    expect(headerValue('a\u2028b\u2029c\u0085d\u007fe')).toBe('a b c d e');
  });

  it('are cut to a length people read, between characters', () => {
    expect(headerValue('🐄'.repeat(300))).toBe(`${'🐄'.repeat(199)}…`);
  });

  it('name a message the same each time', () => {
    expect(messageIdOf('abc', 'https://yards.example.org:8443/x')).toBe('<abc@yards.example.org>');
  });
});

describe('a written mail', () => {
  const page = {
    subject: 'S',
    heading: '<b>H</b>',
    lead: 'a & b',
    sections: [{ title: '"T"', lines: ["it's"], link: { words: 'Open', url: 'http://x/?a=1&b="' } }],
    foot: 'F',
  };

  it('escapes everything in HTML', () => {
    const { html } = render(page);
    expect(html).toContain('&lt;b&gt;H&lt;/b&gt;');
    expect(html).toContain('a &amp; b');
    expect(html).toContain('it&#39;s');
    expect(html).toContain('href="http://x/?a=1&amp;b=&quot;"');
    expect(escapeHtml('<script>"\'&')).toBe('&lt;script&gt;&quot;&#39;&amp;');
  });

  it('has no picture, script or style sheet', () => {
    expect(render(page).html).not.toMatch(/<(img|script|style|link)\b/i);
  });

  it('has the links as text too', () => {
    expect(render(page).text).toContain('http://x/?a=1&b="');
  });
});

describe('account mails', () => {
  it('need a link of this product', () => {
    expect(accountMail('passwordReset', { link: '' }, 'http://localhost:3000')).toBeNull();
    expect(
      accountMail('passwordReset', { link: 'http://localhost:3000.evil.example/x' }, 'http://localhost:3000'),
    ).toBeNull();
    expect(
      accountMail('passwordReset', { link: 'http://localhost:3000/password/x' }, 'http://localhost:3000')?.action?.url,
    ).toBe('http://localhost:3000/password/x');
  });

  it('say who invites and to what', () => {
    const page = accountMail(
      'invitation',
      { link: 'http://localhost:3000/invitations/x', place: 'Gully Flat', invitedBy: 'Kim' },
      'http://localhost:3000',
    );
    expect(page?.subject).toBe('Kim invites you to Gully Flat on Yardbell');
  });
});

describe('moments of reminders', () => {
  const sydney = 'Australia/Sydney';

  it('read a clock time that a change leaves out as after it, and one that comes twice as the first', () => {
    // 4 October 2026: 02:00 AEST becomes 03:00 AEDT; 4 April 2027: 03:00 AEDT becomes 02:00 AEST (IANA tz database)
    expect(iso(localInstant('2026-10-04', '02:30', sydney))).toBe('2026-10-03T16:30:00.000Z');
    expect(iso(localInstant('2027-04-04', '02:30', sydney))).toBe('2027-04-03T15:30:00.000Z');
  });

  it('put the evening on the day before, stale at the morning', () => {
    const due = Date.parse('2026-10-03T20:00:00Z');
    const moment = eveningMoment('2026-10-04', { evening: '18:00', morning: '05:30' }, sydney, [due]);
    expect([iso(moment.dueAt), iso(moment.staleAt)]).toEqual(['2026-10-03T08:00:00.000Z', '2026-10-03T18:30:00.000Z']);
  });

  it('put the morning an hour before the first task when that is earlier, stale at the last', () => {
    const dues = ['2026-10-05T16:00:00Z', '2026-10-06T03:00:00Z'].map((text) => Date.parse(text));
    const moment = morningMoment('2026-10-06', '05:30', sydney, dues);
    expect([iso(moment.dueAt), iso(moment.staleAt)]).toEqual(['2026-10-05T15:00:00.000Z', '2026-10-06T03:00:00.000Z']);
  });

  it('put the closing an hour before the end, but not before the planned start', () => {
    const hour = 3_600_000;
    expect(closingMoment({ dueAt: 0, windowTo: 4 * hour })).toEqual({ dueAt: 3 * hour, staleAt: 4 * hour });
    expect(closingMoment({ dueAt: 0, windowTo: hour / 2 })).toEqual({ dueAt: 0, staleAt: hour / 2 });
  });
});
