/**
 * Shares supplies among demands that may each use only some of them, so that as much as possible is met: maximum flow
 * by augmenting paths (Ford & Fulkerson 1956, "Maximal flow through a network"; from memory). Demands that come first
 * are met first. Answers how much of each demand is met.
 */
export function allocate(
  demands: readonly { amount: number; supplies: readonly number[] }[],
  supplies: readonly number[],
): number[] {
  const left = supplies.map((supply) => Math.max(0, supply));
  const given = demands.map(() => new Map<number, number>());
  return demands.map(({ amount }, d) => {
    let met = 0;
    for (;;) {
      const more = augment(d, amount - met, new Set([d]), demands, left, given);
      if (more <= 0) return met;
      met += more;
    }
  });
}

/** Gives a demand up to `wanted` from one supply, or from what another demand can do without. */
function augment(
  demand: number,
  wanted: number,
  seen: Set<number>,
  demands: readonly { supplies: readonly number[] }[],
  left: number[],
  given: readonly Map<number, number>[],
): number {
  if (wanted <= 0) return 0;
  const own = given[demand];
  const usable = demands[demand]?.supplies ?? [];
  const grant = (supply: number, amount: number) => own?.set(supply, (own.get(supply) ?? 0) + amount);
  for (const supply of usable) {
    const free = Math.min(wanted, left[supply] ?? 0);
    if (free <= 0) continue;
    left[supply] = (left[supply] ?? 0) - free;
    grant(supply, free);
    return free;
  }
  for (const supply of usable)
    for (const [other, holding] of given.entries()) {
      const held = holding.get(supply) ?? 0;
      if (held <= 0 || seen.has(other)) continue;
      seen.add(other);
      const freed = augment(other, Math.min(wanted, held), seen, demands, left, given);
      if (freed <= 0) continue;
      // read again: on the way it may have taken this very supply from a third
      holding.set(supply, (holding.get(supply) ?? 0) - freed);
      grant(supply, freed);
      return freed;
    }
  return 0;
}
