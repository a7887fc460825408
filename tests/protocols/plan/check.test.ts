import { describe, expect, it } from 'vitest';

import { checkProtocol } from '@/protocols/plan/check';
import type { FindingCode, ProtocolBody } from '@/protocols/types';
import { body, days, hours, sevenDay, step } from '@/tests/support/bodies';

const codes = (b: ProtocolBody): FindingCode[] => checkProtocol(b).findings.map((f) => f.code);
const find = (b: ProtocolBody, code: FindingCode) => checkProtocol(b).findings.find((f) => f.code === code);

describe('a protocol that holds', () => {
  const result = checkProtocol(sevenDay());

  it('has no stop, three yardings and ten days', () => {
    expect(result.findings.filter((f) => f.severity === 'stop')).toEqual([]);
    expect([result.yardings, result.lengthDays]).toEqual([3, 10]);
  });

  it('shows every visit in minutes, with its window', () => {
    expect(result.scenarios[0]?.visits).toEqual([
      { visit: 'in', earliestMinutes: 0, idealMinutes: 0, latestMinutes: 0 },
      { visit: 'out', earliestMinutes: 7 * 1440 - 60, idealMinutes: 7 * 1440, latestMinutes: 7 * 1440 + 60 },
      {
        visit: 'ai',
        earliestMinutes: 7 * 1440 + 52 * 60,
        idealMinutes: 7 * 1440 + 54 * 60,
        latestMinutes: 7 * 1440 + 56 * 60,
      },
    ]);
  });

  it('says that a tolerance is the vet’s own where the source gives none', () => {
    expect(find(sevenDay(), 'toleranceNotInSource')).toMatchObject({
      severity: 'note',
      path: 'gaps.0.toleranceMinutes',
    });
    const read = sevenDay();
    read.gaps[0] = { ...days('deviceIn', 'deviceOut', 7), toleranceMark: 'read' };
    expect(codes(read)).not.toContain('toleranceNotInSource');
  });
});

describe('a contradiction', () => {
  it('names the gaps that cannot hold together', () => {
    const impossible = sevenDay();
    impossible.gaps.push({ ...hours('deviceIn', 'service', 0, 100, 200), id: 'whole' });
    const finding = find(impossible, 'contradiction');
    expect(finding?.severity).toBe('stop');
    expect(finding?.params.gaps).toEqual(expect.arrayContaining(['deviceIn-deviceOut', 'deviceOut-service', 'whole']));
  });

  it('is found in the one option that has it, and named by it', () => {
    const choice = sevenDay();
    choice.options = [
      {
        id: 'o',
        label: 'Choice',
        values: [
          { id: 'a', label: 'A' },
          { id: 'b', label: 'B' },
        ],
        default: 'a',
      },
    ];
    choice.gaps.push({ ...hours('deviceIn', 'service', 0, 100, 200), id: 'whole', when: { option: 'o', is: 'b' } });
    expect(find(choice, 'contradiction')?.params.options).toEqual(['b']);
  });

  it('is found in a branch of what is seen', () => {
    const branched = sevenDay();
    branched.observations = [
      {
        id: 'heat',
        label: 'Heat',
        results: [
          { id: 'yes', label: 'in heat' },
          { id: 'no', label: 'not in heat' },
        ],
        onUnknown: 'no',
      },
    ];
    branched.steps.push(step('read', 'heatAidRead', 'ai', { observe: 'heat' }));
    branched.gaps.push({
      ...hours('deviceIn', 'service', 0, 100, 200),
      id: 'whole',
      when: { observed: 'heat', is: 'yes' },
    });
    expect(codes(branched)).toContain('contradiction');
  });
});

describe('what does not make sense is named with its path', () => {
  const cases: [FindingCode, string, (b: ProtocolBody) => void][] = [
    ['nameMissing', 'name', (b) => (b.name = ' ')],
    ['unknownStep', 'gaps.0.to', (b) => (b.gaps[0] = days('deviceIn', 'nothing', 7))],
    ['unknownVisit', 'steps.0.visit', (b) => (b.steps[0] = step('deviceIn', 'deviceIn', 'nowhere'))],
    ['duplicateId', 'steps.6.id', (b) => b.steps.push(step('pg', 'prostaglandin', 'out'))],
    ['emptyVisit', 'visits.3', (b) => b.visits.push({ id: 'empty', label: 'Empty', yarded: true })],
    ['gapBounds', 'gaps.1.most', (b) => (b.gaps[1] = hours('deviceOut', 'service', 60, 60, 54))],
    ['gapBounds', 'gaps.1.ideal', (b) => (b.gaps[1] = hours('deviceOut', 'service', 52, 66, 56))],
    ['gapEmpty', 'gaps.1', (b) => (b.gaps[1] = { id: 'x', from: 'deviceOut', to: 'service', unit: 'elapsedHours' })],
    ['gapReversed', 'gaps.2.to', (b) => b.gaps.push(hours('deviceOut', 'pg', 1, 1, 1))],
    ['badClock', 'gaps.0.clock', (b) => (b.gaps[0] = days('deviceIn', 'deviceOut', 7, 60, { clock: '25:00' }))],
    ['anchorMissing', 'timingAnchor', (b) => (b.timingAnchor = 'gone')],
    ['noService', 'serviceStep', (b) => (b.serviceStep = 'gone')],
    [
      'unknownOption',
      'steps.6.when',
      (b) => b.steps.push(step('x', 'other', 'ai', { when: { option: 'no', is: 'way' } })),
    ],
    [
      'unknownObservation',
      'steps.6.when',
      (b) => b.steps.push(step('x', 'other', 'ai', { when: { observed: 'no', is: 'way' } })),
    ],
    [
      'amountMissing',
      'steps.3.items.0.amount',
      (b) =>
        (b.steps[3] = step('pg', 'prostaglandin', 'out', {
          items: [{ active: 'dinoprost', unit: 'mg', per: 'head', route: 'im' }],
        })),
    ],
  ];
  it.each(cases)('%s at %s', (code, path, spoil) => {
    const spoilt = structuredClone(sevenDay());
    spoil(spoilt);
    expect(
      checkProtocol(spoilt)
        .findings.filter((f) => f.code === code)
        .map((f) => f.path),
    ).toContain(path);
    expect(codes(sevenDay())).not.toContain(code);
  });

  it('a visit that no gap ties to the rest', () => {
    const loose = sevenDay();
    loose.gaps.pop();
    expect(find(loose, 'unreachable')?.visits).toEqual(['ai']);
  });

  it('more than three observations or eight scenarios', () => {
    const seen = (id: string) => ({
      id,
      label: id,
      results: [
        { id: 'y', label: 'y' },
        { id: 'n', label: 'n' },
      ],
      onUnknown: 'n',
    });
    const four = sevenDay(52, 54, 56, { observations: ['a', 'b', 'c', 'd'].map(seen) });
    expect(codes(four)).toContain('tooManyObservations');
    expect(codes(sevenDay(52, 54, 56, { observations: [seen('a')] }))).toContain('observationUnused');
  });

  it('never throws, even on a body without anything', () => {
    expect(codes(body({ name: '' }))).toEqual(expect.arrayContaining(['nameMissing', 'anchorMissing', 'noService']));
  });
});

describe('law and species', () => {
  it('warns of oestradiol and stops melengestrol in the feed of adult cows', () => {
    const ob = sevenDay();
    ob.steps.push(step('ob', 'oestradiolBenzoate', 'in'));
    expect(find(ob, 'oestradiolLaw')?.severity).toBe('warn');
    const fed = sevenDay(52, 54, 56, { classes: ['cow'] });
    fed.steps.push(
      step('mga', 'progestagenFeed', 'in', {
        items: [{ active: 'melengestrolAcetate', amount: 0.5, unit: 'mg', per: 'head', route: 'oral' }],
      }),
    );
    expect(find(fed, 'progestagenFeedAdultCows')?.severity).toBe('stop');
    expect(codes({ ...fed, classes: ['heifer'] })).not.toContain('progestagenFeedAdultCows');
  });
});
