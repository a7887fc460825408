import type { AnimalClass, Condition, ProtocolBody } from '../types';

/** What is known when a condition is asked. An absent part is not known yet. */
export interface Known {
  options?: Readonly<Record<string, string>>;
  observed?: Readonly<Record<string, string>>;
  class?: AnimalClass;
}

/** Whether a condition holds: yes, no, or not known yet (undefined). */
export function holds(condition: Condition | undefined, known: Known): boolean | undefined {
  if (!condition) return true;
  if ('all' in condition) return combine(condition.all, known, false);
  if ('any' in condition) return combine(condition.any, known, true);
  if ('not' in condition) {
    const inner = holds(condition.not, known);
    return inner === undefined ? undefined : !inner;
  }
  if ('class' in condition) return known.class === undefined ? undefined : condition.class.includes(known.class);
  const value = 'option' in condition ? known.options?.[condition.option] : known.observed?.[condition.observed];
  return value === undefined ? undefined : value === condition.is;
}

/** Kleene's three-valued and/or: one part that decides is enough, else one unknown part leaves it open. */
function combine(parts: readonly Condition[], known: Known, decides: boolean): boolean | undefined {
  const values = parts.map((part) => holds(part, known));
  if (values.includes(decides)) return decides;
  return values.includes(undefined) ? undefined : !decides;
}

/** How many combinations the choices of some lists make. */
export const combinationCount = (lists: readonly (readonly unknown[])[]): number =>
  lists.reduce((count, list) => count * list.length, 1);

/**
 * Every allowed combination of option values, the defaults first; one empty combination without options.
 * At most `most` of them: their number is the product of all choices.
 */
export function optionCombinations(
  body: Pick<ProtocolBody, 'options'>,
  most = Number.POSITIVE_INFINITY,
): Record<string, string>[] {
  return body.options.reduce<Record<string, string>[]>(
    (combinations, option) => {
      const ids = [option.default, ...option.values.map((value) => value.id).filter((id) => id !== option.default)];
      const grown: Record<string, string>[] = [];
      for (const combination of combinations)
        for (const id of ids) if (grown.length < most) grown.push({ ...combination, [option.id]: id });
      return grown;
    },
    [{}],
  );
}

/** Every combination of what can be seen in an animal: the scenarios of a protocol. */
export function observationCombinations(body: Pick<ProtocolBody, 'observations'>): Record<string, string>[] {
  return body.observations.reduce<Record<string, string>[]>(
    (combinations, seen) =>
      combinations.flatMap((combination) => seen.results.map((result) => ({ ...combination, [seen.id]: result.id }))),
    [{}],
  );
}

/** The chosen value of every option: what was given, else the default. Unknown options are left out. */
export const resolveOptions = (
  body: Pick<ProtocolBody, 'options'>,
  given: Readonly<Record<string, string>> = {},
): Record<string, string> =>
  Object.fromEntries(
    body.options.map((option) => {
      const chosen = given[option.id];
      return [option.id, option.values.some((value) => value.id === chosen) && chosen ? chosen : option.default];
    }),
  );
