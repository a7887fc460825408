import type { Bound } from '../network/network';
import type { Finding, ProtocolBody } from '../types';

/** A contradiction as it was met in one scenario. */
export interface Met {
  /** Gaps of the negative cycle. */
  cycle: readonly Bound[];
  options: Readonly<Record<string, string>>;
  /** Empty: gaps of all branches imposed together. */
  observed: Readonly<Record<string, string>>;
}

/**
 * One finding for each set of gaps that cannot hold together, with the options and sightings that all its scenarios
 * share: none when it stands whatever is chosen or seen.
 */
export function contradictions(body: ProtocolBody, met: readonly Met[]): Finding[] {
  const sets = new Map<string, Met[]>();
  for (const one of met) {
    const key = [...new Set(one.cycle.map((bound) => bound.id))].sort().join('|');
    sets.set(key, [...(sets.get(key) ?? []), one]);
  }
  return [...sets.values()].map((scenarios) => {
    const branches = scenarios.filter((scenario) => Object.keys(scenario.observed).length > 0);
    return finding(body, scenarios[0]?.cycle ?? [], {
      options: shared(scenarios.map((scenario) => scenario.options)),
      observed: shared(branches.map((scenario) => scenario.observed)),
      // each branch holds by itself, but one visit cannot be at the times of all: the step must be two
      ...(body.observations.length > 0 && branches.length === 0 ? { across: 'branches' } : {}),
    });
  });
}

/** Values that are the same in all of them, in order. */
function shared(choices: readonly Readonly<Record<string, string>>[]): string[] {
  const [first, ...rest] = choices;
  return Object.entries(first ?? {})
    .filter(([id, value]) => rest.every((choice) => choice[id] === value))
    .map(([, value]) => value);
}

function finding(body: ProtocolBody, cycle: readonly Bound[], branch: Finding['params']): Finding {
  const ids = [...new Set(cycle.map((bound) => bound.id))];
  const gaps = ids.map((id) => body.gaps.find((gap) => gap.id === id));
  const first = body.gaps.findIndex((gap) => ids.includes(gap.id));
  return {
    code: 'contradiction',
    severity: 'stop',
    steps: [...new Set(gaps.flatMap((gap) => (gap ? [gap.from, gap.to] : [])))],
    params: { gaps: ids, ...branch },
    ...(first === -1 ? {} : { path: `gaps.${first}` }),
    source: 'Dechter, Meiri & Pearl, Temporal constraint networks (Artificial Intelligence 49, 1991)',
  };
}
