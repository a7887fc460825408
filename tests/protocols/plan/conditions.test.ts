import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import {
  combinationCount,
  holds,
  observationCombinations,
  optionCombinations,
  resolveOptions,
  type Known,
} from '@/protocols/plan/conditions';
import { resolve } from '@/protocols/plan/resolve';
import type { Condition } from '@/protocols/types';
import { hours, sevenDay, step } from '@/tests/support/bodies';

const yes: Condition = { option: 'o', is: 'a' };
const no: Condition = { option: 'o', is: 'b' };
const open: Condition = { observed: 'heat', is: 'yes' };
const known: Known = { options: { o: 'a' } };

describe('conditions in three values', () => {
  it.each<[string, Condition, boolean | undefined]>([
    ['an option that is chosen', yes, true],
    ['one that is not', no, false],
    ['what is not yet seen', open, undefined],
    ['a class that is not known', { class: ['cow'] }, undefined],
    ['not yes', { not: yes }, false],
    ['not open', { not: open }, undefined],
    ['yes and open', { all: [yes, open] }, undefined],
    ['no and open: decided', { all: [open, no] }, false],
    ['yes or open: decided', { any: [open, yes] }, true],
    ['no or open', { any: [no, open] }, undefined],
    ['nothing of all', { all: [] }, true],
    ['nothing of any', { any: [] }, false],
  ])('%s', (_, condition, answer) => {
    expect(holds(condition, known)).toBe(answer);
  });

  it('without a condition hold', () => {
    expect(holds(undefined, {})).toBe(true);
  });

  it('ask the class', () => {
    expect(holds({ class: ['cow', 'heifer'] }, { class: 'cow' })).toBe(true);
    expect(holds({ class: ['heifer'] }, { class: 'cow' })).toBe(false);
  });

  /** Random conditions over two options and two sightings. */
  const condition = fc.letrec<{ tree: Condition; leaf: Condition }>((tie) => ({
    leaf: fc.oneof(
      fc.record({ option: fc.constantFrom('o', 'p'), is: fc.constantFrom('a', 'b') }),
      fc.record({ observed: fc.constantFrom('heat', 'cl'), is: fc.constantFrom('a', 'b') }),
    ),
    tree: fc.oneof(
      { maxDepth: 4 },
      tie('leaf'),
      fc.record({ not: tie('tree') }),
      fc.record({ all: fc.array(tie('tree'), { maxLength: 3 }) }),
      fc.record({ any: fc.array(tie('tree'), { maxLength: 3 }) }),
    ),
  })).tree;
  const value = fc.constantFrom('a', 'b');

  it('never change an answer once it is given: what is seen later only settles what was open', () => {
    fc.assert(
      fc.property(condition, value, value, value, value, (when, o, p, heat, cl) => {
        const all: Known = { options: { o, p }, observed: { heat, cl } };
        const settled = holds(when, all);
        expect(settled).toBeTypeOf('boolean');
        for (const part of [{}, { options: { o } }, { options: { o, p } }, { options: { o, p }, observed: { cl } }]) {
          const early = holds(when, part);
          if (early !== undefined) expect(early).toBe(settled);
        }
      }),
      { numRuns: 2000, seed: 3 },
    );
  });
});

describe('combinations', () => {
  const options = [
    { id: 'o', label: 'o', values: ['a', 'b'].map((id) => ({ id, label: id })), default: 'b' },
    { id: 'p', label: 'p', values: ['x', 'y', 'z'].map((id) => ({ id, label: id })), default: 'x' },
  ];

  it('of options are all, each once, the defaults first', () => {
    const all = optionCombinations({ options });
    expect(all).toHaveLength(combinationCount(options.map((o) => o.values)));
    expect(all[0]).toEqual({ o: 'b', p: 'x' });
    expect(new Set(all.map((c) => JSON.stringify(c))).size).toBe(6);
    expect(optionCombinations({ options }, 4)).toHaveLength(4);
    expect(optionCombinations({ options: [] })).toEqual([{}]);
  });

  it('of sightings are all, each once', () => {
    const seen = (id: string) => ({
      id,
      label: id,
      results: ['y', 'n'].map((r) => ({ id: r, label: r })),
      onUnknown: 'n',
    });
    const all = observationCombinations({ observations: ['1', '2', '3'].map(seen) });
    expect(new Set(all.map((c) => JSON.stringify(c))).size).toBe(8);
  });

  it('take what is given, the default for the rest, and nothing unknown', () => {
    expect(resolveOptions({ options }, { o: 'a', q: 'w' })).toEqual({ o: 'a', p: 'x' });
    expect(resolveOptions({ options }, { o: 'c' })).toEqual({ o: 'b', p: 'x' });
  });
});

describe('a protocol with its options chosen', () => {
  const body = sevenDay(52, 54, 56, {
    options: [{ id: 'o', label: 'o', values: ['a', 'b'].map((id) => ({ id, label: id })), default: 'a' }],
  });
  body.visits.push({ id: 'extra', label: 'Extra', yarded: true });
  body.steps.push(step('extra', 'weigh', 'extra', { when: { option: 'o', is: 'b' } }));
  body.gaps.push(hours('deviceOut', 'extra', 24, 24, 24));

  it('drops visits and gaps that cannot apply', () => {
    expect(resolve(body).visits).toEqual(['in', 'out', 'ai']);
    expect(resolve(body).gaps.map((g) => g.gap.id)).not.toContain('deviceOut-extra');
    expect(resolve(body, { o: 'b' }).visits).toEqual(['in', 'out', 'ai', 'extra']);
  });

  it('keeps what depends on what is not yet seen, until it is', () => {
    const seen = structuredClone(body);
    seen.steps = seen.steps.map((s) => (s.id === 'extra' ? { ...s, when: { observed: 'heat', is: 'no' } } : s));
    expect(resolve(seen).visits).toContain('extra');
    expect(resolve(seen, {}, { observed: { heat: 'yes' } }).visits).not.toContain('extra');
  });

  it('hangs every visit but the first on one placed before it', () => {
    const { tree, roots } = resolve(body, { o: 'b' });
    expect(roots).toEqual(['in']);
    expect(tree.map((edge) => [edge.parent, edge.visit])).toEqual([
      ['in', 'out'],
      ['out', 'ai'],
      ['out', 'extra'],
    ]);
  });
});
