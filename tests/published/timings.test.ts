import { describe, expect, it } from 'vitest';

import { laidOut } from './kit';

/**
 * Published timings, each with its source: [read] means that the abstract or stored text was read, [derived] that the
 * date follows from a read interval by arithmetic, [from memory] that the figure could not be read.
 */
const start = '2026-05-04T08:00';

describe('beef, with a device', () => {
  it('cows, 7 days, 60 to 66 h (North Dakota State University, Carrington; Kansas State KAESRR 4(2), 2018) [read, dates derived]', () => {
    const plan = laidOut('device-7-cows', start);
    expect(plan.at('out')).toBe('2026-05-11T08:00');
    expect(plan.window('ai')).toEqual(['2026-05-13T20:00', '2026-05-14T02:00']);
  });

  it('heifers, 7 days, 54 h (Oosthuizen et al., multi-state trial) [read]; 2 h either side (Beef Reproduction Task Force) [from memory]', () => {
    const plan = laidOut('device-7-heifers', start);
    expect(plan.at('ai')).toBe('2026-05-13T14:00');
    expect(plan.window('ai')).toEqual(['2026-05-13T12:00', '2026-05-13T16:00']);
  });

  it('cows, 5 days, two doses, 72 h (Gunn et al. 2016, Professional Animal Scientist 32:82-89) [read]; 8 h between doses [from memory]', () => {
    const plan = laidOut('device-5-cows', start);
    expect([plan.at('out'), plan.at('pg2'), plan.at('ai')]).toEqual([
      '2026-05-09T08:00',
      '2026-05-09T16:00',
      '2026-05-12T08:00',
    ]);
  });

  it('cows, 5 days, 12 h between doses as first published (AABP annual conference 2009) [read]', () => {
    expect(laidOut('device-5-cows', start, 'Europe/Dublin', { secondPg: 'h12' }).at('pg2')).toBe('2026-05-09T20:00');
  });

  it('cows, 7 and 7, 66 h give or take 2 (University of Arkansas) [read, dates derived]', () => {
    const plan = laidOut('device-7-and-7-cows', start);
    expect([plan.at('mid'), plan.at('out'), plan.at('ai')]).toEqual([
      '2026-05-11T08:00',
      '2026-05-18T08:00',
      '2026-05-21T02:00',
    ]);
    expect(plan.window('ai')).toEqual(['2026-05-21T00:00', '2026-05-21T04:00']);
  });

  it('suckler cows, AI on day 10, 72 h after removal (Teagasc, 2,205 cows) [read]', () => {
    const plan = laidOut('device-7-suckler', start);
    expect([plan.days('ai'), plan.hoursFrom('out', 'ai')]).toEqual([10, 72]);
  });

  it('heifers, 14-day device: begin 12 April 2020 to breed on 15 May (South Dakota State University Extension, 2020) [dates read]', () => {
    const plan = laidOut('device-14-heifers', '2020-04-12T14:00', 'America/Chicago');
    expect([plan.at('out').slice(0, 10), plan.at('pg').slice(0, 10), plan.at('ai').slice(0, 10)]).toEqual([
      '2020-04-26',
      '2020-05-12',
      '2020-05-15',
    ]);
  });

  it('heifers, split time: 66 h in heat, the rest at 90 h (Thomas et al., 1,138 heifers) [read]', () => {
    const plan = laidOut('device-14-heifers-split', start);
    expect([plan.hoursFrom('pg', 'ai1'), plan.hoursFrom('pg', 'ai2')]).toEqual([66, 90]);
  });

  it('cows, split time: 65 h and 84 h (Kansas State KAESRR 4(2), 2018) [read]', () => {
    const plan = laidOut('device-7-cows-split', start);
    expect([plan.hoursFrom('out', 'ai1'), plan.hoursFrom('out', 'ai2')]).toEqual([65, 84]);
  });

  it('no device, 66 to 72 h after prostaglandin (Theriogenology, secondary text) [read]', () => {
    const plan = laidOut('gnrh-pg-cows', start);
    expect([plan.days('pg'), plan.hoursFrom('pg', 'ai')]).toEqual([7, 69]);
    expect(plan.window('ai')).toEqual(['2026-05-14T02:00', '2026-05-14T08:00']);
  });

  it('label program: prostaglandin 24 h before removal, AI at 56 h, or GnRH at 36 h and AI 16 to 20 h later (NOAH Compendium) [read]', () => {
    const plan = laidOut('device-7-label-pg-before', start);
    expect(plan.days('out')).toBeGreaterThanOrEqual(7);
    expect(plan.days('out')).toBeLessThanOrEqual(8);
    expect(plan.hoursFrom('out', 'ai')).toBe(56);
    expect(plan.hoursFrom('pg', 'out')).toBe(24);
    const timed = laidOut('device-7-label-pg-before', start, 'Europe/Dublin', { timing: 'gnrh' });
    expect([timed.hoursFrom('out', 'g2'), timed.hoursFrom('g2', 'ai')]).toEqual([36, 18]);
  });
});

describe('progestagen feed', () => {
  it('14 feedings, prostaglandin 19 days after the last (University of Nebraska-Lincoln Extension) [read, dates derived]', () => {
    const plan = laidOut('progestagen-feed-heifers', start);
    expect(plan.at('feed', 14)).toBe('2026-05-17T08:00');
    expect(plan.at('pg')).toBe('2026-06-05T08:00');
    expect(plan.days('pg')).toBe(32);
  });

  it('first feeding 34 days, prostaglandin 2 days before breeding begins (MFA Incorporated, feed bulletin) [read, derived]', () => {
    // breeding begins two days after prostaglandin on the sheet's Day 35, counting the first feeding as Day 1
    const plan = laidOut('progestagen-feed-heifers', '2026-05-12T08:00');
    expect(plan.at('pg').slice(0, 10)).toBe('2026-06-13');
    const breeding = new Date(Date.parse('2026-06-15') - 34 * 86_400_000).toISOString().slice(0, 10);
    expect(breeding).toBe('2026-05-12');
  });

  it('AI 72 h after prostaglandin, give or take 2 (Beef Reproduction Task Force) [from memory]', () => {
    expect(laidOut('progestagen-feed-heifers', start).window('ai')).toEqual(['2026-06-08T06:00', '2026-06-08T10:00']);
  });
});

describe('with oestradiol, Bos indicus', () => {
  it('9 days, prostaglandin on day 7, AI 48 h after removal on day 11 (Meneghetti et al. 2009, Theriogenology 72:179-189) [read]', () => {
    const plan = laidOut('oestradiol-9-indicus', start, 'America/Sao_Paulo');
    expect(['pg', 'out', 'ai'].map(plan.days)).toEqual([7, 9, 11]);
    expect(plan.hoursFrom('out', 'ai')).toBe(48);
  });

  it('8 days, AI 48 to 54 h after removal (Revista Brasileira de Zootecnia, 2014) [read]', () => {
    const plan = laidOut('oestradiol-8-indicus', start, 'America/Sao_Paulo');
    expect(plan.days('out')).toBe(8);
    expect(plan.window('ai')).toEqual(['2026-05-14T08:00', '2026-05-14T14:00']);
  });

  it('benzoate 24 h after removal takes one yarding more (Sales et al. 2012, Theriogenology 78:510-516) [read]', () => {
    const plan = laidOut('oestradiol-8-indicus', start, 'America/Sao_Paulo', { inducer: 'ob' });
    expect(plan.hoursFrom('out', 'induce')).toBe(24);
    expect(laidOut('oestradiol-8-indicus', start, 'America/Sao_Paulo').plan.visits).toHaveLength(3);
  });

  it('6 days, in heat at 60 h, the rest at 72 h (Braford heifers, DOAJ) [read]', () => {
    const plan = laidOut('oestradiol-6-heifers', start);
    expect([plan.days('out'), plan.hoursFrom('out', 'ai1'), plan.hoursFrom('out', 'ai2')]).toEqual([6, 60, 72]);
  });
});

describe('dairy', () => {
  it('Ovsynch, 56 h and 16 h (Carvalho et al. 2014, Journal of Dairy Science 97) [read, dates derived]', () => {
    const plan = laidOut('ovsynch-56', start);
    expect([plan.at('pg'), plan.at('g2'), plan.at('ai')]).toEqual([
      '2026-05-11T08:00',
      '2026-05-13T16:00',
      '2026-05-14T08:00',
    ]);
  });

  // Croatian Veterinary Journal 57(1), article 4, for all three [read]
  it.each([
    ['presynch-12-ovsynch', ['pre1', 'pre2', 'g1', 'pg', 'g2'], [0, 14, 26, 33, 35]],
    ['double-ovsynch', ['pre1', 'pre2', 'pre3', 'g1', 'pg'], [0, 7, 10, 17, 24]],
    ['g6g', ['pre1', 'pre2', 'g1', 'pg', 'g2'], [0, 2, 8, 15, 17]],
  ])('%s has the published days', (id, visits, days) => {
    expect(visits.map(laidOut(id, start).days)).toEqual(days);
  });

  it('Double Ovsynch by days in milk: 53, 60, 63, 70, 77, AI at 80 (Carvalho et al. 2014) [read]', () => {
    const plan = laidOut('double-ovsynch', start);
    expect(['pre1', 'pre2', 'pre3', 'g1', 'pg', 'ai'].map((visit) => 53 + plan.days(visit))).toEqual([
      53, 60, 63, 70, 77, 80,
    ]);
  });

  it('Resynch from a scan 32 days after AI on 14 May: 15 June, 22 June, 56 h, 16 to 18 h (PubMed 29224858) [read, dates derived]', () => {
    const plan = laidOut('resynch-32', '2026-06-15T08:00');
    expect([plan.at('pg'), plan.hoursFrom('pg', 'g2')]).toEqual(['2026-06-22T08:00', 56]);
    expect(plan.window('ai')).toEqual(['2026-06-25T08:00', '2026-06-25T10:00']);
  });

  it('heifers, 5 days: doses on days 5 and 6, AI on day 8 (Dairy Cattle Reproduction Council) [from memory]', () => {
    expect(['out', 'pg2', 'ai'].map(laidOut('device-5-dairy-heifers', start).days)).toEqual([5, 6, 8]);
  });
});

describe('prostaglandin only', () => {
  it('two doses 11 days apart, AI at 72 and 96 h (maiden heifers, scilit.com abstract) [read]', () => {
    const plan = laidOut('two-pg-heifers', start);
    expect([plan.days('pg2'), plan.hoursFrom('pg2', 'ai1'), plan.hoursFrom('pg2', 'ai2')]).toEqual([11, 72, 96]);
  });
});

describe('across a clock change', () => {
  it('devices in on 29 September 2026 at seven in Sydney come out at seven on 6 October, 6 days 23 hours later (IANA database) [derived]', () => {
    const plan = laidOut('device-7-heifers', '2026-09-29T07:00', 'Australia/Sydney');
    expect(plan.at('out')).toBe('2026-10-06T07:00');
    expect(plan.hoursFrom('in', 'out')).toBe(167);
    expect(plan.at('ai')).toBe('2026-10-08T13:00');
  });
});
