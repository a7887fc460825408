import fc from 'fast-check';
import loadHighs from 'highs';
import { beforeAll, describe, expect, it } from 'vitest';

import { allocate } from '@/protocols/plan/allocate';
import { authorityCover, authorityFindings, type Permission } from '@/protocols/plan/authorityFindings';
import { expand } from '@/protocols/plan/expand';
import { toInstant } from '@/protocols/time/zoned';
import type { AnimalClass, Item } from '@/protocols/types';
import { sevenDay, step } from '@/tests/support/bodies';

const zone = 'Australia/Sydney';
const gnrh: Item = { active: 'gonadorelin', amount: 100, unit: 'ug', per: 'head', route: 'im' };
const body = sevenDay(52, 54, 56, { classes: ['heifer', 'cow'] });
const visits = expand(body, { fix: { visit: 'in', at: toInstant('2026-05-04T08:00', zone).at }, zone }).visits;

const permission = (more: Partial<Permission> = {}): Permission => ({
  active: 'dinoprost',
  amount: 25,
  unit: 'mg',
  classes: ['heifer', 'cow'],
  headLeft: 100,
  validFrom: '2026-05-01',
  validTo: '2026-05-31',
  ...more,
});

const of = (
  permissions: Permission[],
  heads: Partial<Record<AnimalClass, number>>,
  protocol = body,
  active: Permission['active'] = 'dinoprost',
) => {
  const groups = Object.entries(heads).map(([c, head]) => ({ class: c as AnimalClass, head }));
  const cover = authorityCover(protocol, groups, visits, permissions, zone).filter((need) => need.active === active);
  return { covered: cover.map((need) => need.covered), findings: authorityFindings(cover, permissions, zone) };
};

describe('one permission for two classes', () => {
  it('covers each head once: 100 for 80 heifers and 80 cows are 60 short', () => {
    const { covered, findings } = of([permission()], { heifer: 80, cow: 80 });
    expect(covered).toEqual([80, 20]);
    expect(findings).toMatchObject([{ code: 'authorityShort', params: { class: 'cow', covered: 20, short: 60 } }]);
  });

  it('is left to the class that has no other', () => {
    const own = permission({ classes: ['heifer'], headLeft: 80 });
    // in this order the heifers would take the shared one first
    expect(of([permission({ headLeft: 80 }), own], { heifer: 80, cow: 80 })).toEqual({
      covered: [80, 80],
      findings: [],
    });
  });

  it('is shared among groups of one class by their sum', () => {
    const groups = [
      { class: 'heifer' as const, head: 60 },
      { class: 'heifer' as const, head: 50 },
    ];
    const cover = authorityCover(body, groups, visits, [permission()], zone).filter((n) => n.active === 'dinoprost');
    expect(cover.map((need) => [need.head, need.covered])).toEqual([[110, 100]]);
  });
});

describe('two amounts of one active for the same animals', () => {
  it('are covered by one permission for the larger, the animals counted once', () => {
    const twice = structuredClone(body);
    twice.steps.push(step('second', 'gnrh', 'ai', { items: [{ ...gnrh, amount: 50 }] }));
    const given = permission({ active: 'gonadorelin', amount: 100, unit: 'ug', headLeft: 30 });
    expect(of([given], { heifer: 30 }, twice, 'gonadorelin').covered).toEqual([30, 30]);
  });
});

describe('why a permission does not cover', () => {
  const reason = (...permissions: Permission[]) => of(permissions, { heifer: 80 }).findings[0];

  it('is that there is none for the active, or none for the class', () => {
    expect(reason(permission({ active: 'cloprostenol' }))?.code).toBe('authorityMissing');
    expect(reason(permission({ classes: ['cow'] }))).toMatchObject({
      code: 'authorityWrongClass',
      params: { classes: ['cow'] },
    });
  });

  it('is that it ends before the day it is needed, or begins after it', () => {
    expect(reason(permission({ validTo: '2026-05-10' }))?.code).toBe('authorityExpired');
    const later = reason(permission({ validFrom: '2026-05-12', validTo: '2026-06-30' }));
    expect(later).toMatchObject({
      code: 'authorityExpired',
      params: { validFrom: '2026-05-12', validTo: '2026-06-30' },
    });
    expect(reason(permission({ validFrom: '2026-05-11', validTo: '2026-05-11' }))).toBeUndefined();
  });

  it('is that it allows less, or is written in another unit', () => {
    expect(reason(permission({ amount: 24.9 }))?.code).toBe('authorityWrongActive');
    expect(reason(permission({ unit: 'ug' }))).toMatchObject({
      code: 'authorityWrongActive',
      params: { authorised: 25, authorisedUnit: 'ug' },
    });
  });

  it('is the head count when all else fits, also when nothing is left of it', () => {
    expect(reason(permission({ headLeft: 0 }))).toMatchObject({ code: 'authorityShort', params: { short: 80 } });
    expect(reason(permission({ headLeft: -5 }))).toMatchObject({ code: 'authorityShort', params: { covered: 0 } });
  });

  it('is never the aid that is stuck on', () => {
    const aided = sevenDay();
    aided.steps.push(
      step('aid', 'heatAidOn', 'out', {
        items: [{ active: 'heatAid', amount: 1, unit: 'patch', per: 'head', route: 'topical' }],
      }),
    );
    const cover = authorityCover(aided, [{ class: 'heifer', head: 10 }], visits, [], zone);
    expect(cover.map((need) => need.active)).not.toContain('heatAid');
  });
});

describe('sharing supplies among demands', () => {
  let highs: Awaited<ReturnType<typeof loadHighs>>;
  beforeAll(async () => {
    highs = await loadHighs();
  });

  const case_ = fc.record({
    supplies: fc.array(fc.nat(40), { minLength: 1, maxLength: 4 }),
    demands: fc.array(fc.record({ amount: fc.integer({ min: 1, max: 50 }), uses: fc.array(fc.nat(3)) }), {
      minLength: 1,
      maxLength: 5,
    }),
  });

  it('meets as much as the linear-programming solver can, and no demand or supply is exceeded', () => {
    fc.assert(
      fc.property(case_, ({ supplies, demands: raw }) => {
        const demands = raw.map(({ amount, uses }) => ({
          amount,
          supplies: [...new Set(uses)].filter((s) => s < supplies.length),
        }));
        const met = allocate(demands, supplies);
        met.forEach((amount, d) => expect(amount).toBeLessThanOrEqual(demands[d]?.amount ?? 0));
        const flows = demands.flatMap(({ supplies: usable }, d) => usable.map((s) => ({ d, s, name: `x${d}_${s}` })));
        const total = met.reduce((a, b) => a + b, 0);
        if (flows.length === 0) {
          expect(total).toBe(0);
          return;
        }
        const sum = (list: typeof flows) => list.map((f) => f.name).join(' + ');
        const row = (name: string, list: typeof flows, most: number) =>
          list.length === 0 ? [] : [` ${name}: ${sum(list)} <= ${most}`];
        const rows = [
          ...demands.flatMap(({ amount }, d) =>
            row(
              `d${d}`,
              flows.filter((f) => f.d === d),
              amount,
            ),
          ),
          ...supplies.flatMap((supply, s) =>
            row(
              `s${s}`,
              flows.filter((f) => f.s === s),
              supply,
            ),
          ),
        ];
        const best = highs.solve(`Maximize\n obj: ${sum(flows)}\nSubject To\n${rows.join('\n')}\nEnd\n`);
        expect(best.Status).toBe('Optimal');
        expect(total).toBeCloseTo(best.ObjectiveValue, 6);
      }),
      { numRuns: 400, seed: 1956 },
    );
  });

  it('meets the first demand first', () => {
    const both = [
      { amount: 10, supplies: [0] },
      { amount: 10, supplies: [0] },
    ];
    expect(allocate(both, [12])).toEqual([10, 2]);
  });
});
