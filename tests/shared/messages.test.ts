import { describe, expect, it } from 'vitest';

import { actives, animalClasses, doseUnits, findingCodes, routes, stepKinds, type Finding } from '@/protocols/types';
import { describeFinding } from '@/shared/findings';
import { hasMessage, t } from '@/shared/messages';
import { fill } from '@/shared/messages/format';
import { duration, day, dayClock } from '@/shared/when';
import { sevenDay } from '../support/bodies';

describe('the catalogue', () => {
  it('has words for everything that data can name', () => {
    const keys = [
      ...stepKinds.map((kind) => `step.${kind}`),
      ...animalClasses.flatMap((one) => [`class.${one}`, `classOne.${one}`]),
      ...actives.map((active) => `active.${active}`),
      ...doseUnits.map((unit) => `unit.${unit}`),
      ...routes.map((route) => `route.${route}`),
      ...findingCodes.flatMap((code) => [`finding.${code}.message`, `finding.${code}.remedy`]),
    ];
    expect(keys.filter((key) => !hasMessage(key))).toEqual([]);
  });

  it('fills names, figures and plurals (Unicode Technical Standard 35)', () => {
    expect(t('cohorts.head', { count: 1 })).toBe('1 head');
    expect(fill('{n, plural, =0 {none} one {# cow} other {# cows}} of {name}', { n: 0, name: 'A' }, 'en')).toBe(
      'none of A',
    );
    expect(fill('{n, plural, one {# cow} other {# cows}}', { n: 1200 }, 'en')).toBe('1,200 cows');
    expect(fill('{missing}!', {}, 'en')).toBe('!');
  });
});

describe('times', () => {
  it('name weekday and month, in the property’s zone', () => {
    const at = Date.UTC(2026, 9, 5, 20);
    expect([
      day(at, 'Australia/Sydney'),
      dayClock(at, 'Australia/Sydney'),
      dayClock(at, 'America/New_York', 'en-US'),
    ]).toEqual(['Tue 6 Oct', 'Tue 6 Oct 07:00', 'Mon 5 Oct 16:00']);
  });

  it('are long in hours up to four days, then in days', () => {
    expect([20, 65, 54 * 60, 167 * 60, 7 * 1440, -90].map(duration)).toEqual([
      '20 min',
      '1 h 05',
      '54 h',
      '6 d 23 h',
      '7 d',
      '−1 h 30',
    ]);
  });
});

describe('findings', () => {
  const words = { zone: 'Australia/Sydney', body: sevenDay() };
  const finding = (part: Partial<Finding>): Finding => ({
    code: 'weekend',
    severity: 'note',
    steps: [],
    params: {},
    ...part,
  });

  it('say the clock change with both figures, and what to do', () => {
    const said = describeFinding(
      finding({
        code: 'clockChange',
        params: {
          from: 'deviceIn',
          to: 'deviceOut',
          changeAt: Date.UTC(2026, 9, 3, 16),
          shiftMinutes: 60,
          elapsedMinutes: 167 * 60,
          nominalMinutes: 168 * 60,
        },
      }),
      words,
    );
    expect(said.message).toBe('Clocks go forward 1 h on Sun 4 Oct 03:00. Device in to Device out is 6 d 23 h.');
  });

  it('name tags, and how many more there are', () => {
    const said = describeFinding(
      finding({ code: 'notKnownEmpty', params: { count: 22, tags: ['0412', '0413'] } }),
      words,
    );
    expect(said.message).toContain('22 animals are not known empty');
    expect(said.message).toContain('0412, 0413 and 20 more');
  });

  it('say by how many head an authority is short', () => {
    const said = describeFinding(
      finding({ code: 'authorityShort', params: { active: 'dinoprost', head: 156, covered: 154, short: 2 } }),
      words,
    );
    expect(said).toEqual({
      message: 'The authority for dinoprost covers 154 head, the cohort has 156.',
      remedy: 'Ask the vet to extend it by 2, or leave 2 out.',
    });
  });
});
