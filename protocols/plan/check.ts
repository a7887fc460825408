import type { Finding, ProtocolBody } from '../types';
import { checkReferences } from './checkReferences';
import { checkSources } from './checkSources';
import { observationCombinations, optionCombinations } from './conditions';
import { nominalVisits, solveNominal, type NominalVisit } from './nominal';
import { resolve, type Resolved } from './resolve';

export interface Scenario {
  options: Record<string, string>;
  /** Empty: all animals, gaps of every branch imposed together. */
  observed: Record<string, string>;
  consistent: boolean;
  visits: NominalVisit[];
}

export interface CheckResult {
  findings: Finding[];
  /** One for each allowed choice of options; then one for each branch of it, where animals are observed. */
  scenarios: Scenario[];
  /** Visits through the yards with the default options. */
  yardings: number;
  /** Days from the first to the last visit with the default options, rounded up. */
  lengthDays: number;
}

/** More choices than this are not all checked; the schema allows fewer. */
const mostCombinations = 64;

/**
 * Whether a protocol is possible, for every allowed choice of options and every branch; what is wrong in it and
 * where; and how long it is. Never throws: a body that makes no sense gives findings.
 */
export function checkProtocol(body: ProtocolBody): CheckResult {
  const findings = [...checkReferences(body), ...checkSources(body)];
  const scenarios: Scenario[] = [];
  const seen = new Set<string>();
  const report = (found: Finding[]) => {
    for (const finding of found) {
      const key = `${finding.code}|${finding.steps.join()}|${finding.visits?.join() ?? ''}`;
      if (!seen.has(key)) findings.push(finding);
      seen.add(key);
    }
  };
  for (const options of optionCombinations(body).slice(0, mostCombinations)) {
    const together = resolve(body, options);
    report([...unreachable(together), ...judge(body, together, {}, scenarios)]);
    if (body.observations.length === 0 || body.observations.length > 3) continue;
    for (const observed of observationCombinations(body))
      report(judge(body, resolve(body, options, { observed }), observed, scenarios));
  }
  const main = scenarios[0];
  const last = main?.visits.at(-1)?.idealMinutes ?? 0;
  const yarded = new Set(body.visits.filter((visit) => visit.yarded).map((visit) => visit.id));
  return {
    findings,
    scenarios,
    yardings: main?.visits.filter((visit) => yarded.has(visit.visit)).length ?? 0,
    lengthDays: Math.ceil(last / 1440),
  };
}

function judge(body: ProtocolBody, resolved: Resolved, observed: Record<string, string>, into: Scenario[]): Finding[] {
  const solution = solveNominal(resolved);
  into.push({ options: resolved.options, observed, consistent: solution.consistent, visits: nominalVisits(resolved) });
  if (solution.consistent) return idealsOutside(resolved);
  const gaps = solution.cycle.map(({ bound }) => resolved.gaps.find((g) => g.gap.id === bound.id)?.gap);
  const steps = gaps.flatMap((gap) => (gap ? [gap.from, gap.to] : []));
  const first = body.gaps.findIndex((gap) => gap.id === solution.cycle[0]?.bound.id);
  return [
    {
      code: 'contradiction',
      severity: 'stop',
      steps: [...new Set(steps)],
      params: {
        gaps: [...new Set(solution.cycle.map(({ bound }) => bound.id))],
        options: Object.values(resolved.options),
        observed: Object.values(observed),
      },
      ...(first === -1 ? {} : { path: `gaps.${first}` }),
      source: 'Dechter, Meiri & Pearl, Temporal constraint networks (Artificial Intelligence 49, 1991)',
    },
  ];
}

/** Visits that no chain of gaps ties to the first one: nobody could say when they are due. */
const unreachable = (resolved: Resolved): Finding[] =>
  resolved.roots.slice(1).map((visit): Finding => ({
    code: 'unreachable',
    severity: 'stop',
    steps: (resolved.stepsOf.get(visit) ?? []).map((step) => step.id),
    visits: [visit],
    params: { visit },
  }));

/** The ideals may each be inside their own gap and yet not together: the planned line must hold too. */
function idealsOutside(resolved: Resolved): Finding[] {
  const times = new Map(nominalVisits(resolved).map((visit) => [visit.visit, visit.idealMinutes]));
  return resolved.gaps.flatMap(({ gap, from, to }): Finding[] => {
    const elapsed = (times.get(to) ?? 0) - (times.get(from) ?? 0);
    const per = gap.unit === 'elapsedHours' ? 60 : gap.unit === 'localDays' ? 1440 : 720;
    const tolerance = gap.unit === 'localDays' ? (gap.toleranceMinutes ?? 0) : 0;
    const tooShort = gap.least !== undefined && elapsed < gap.least * per - tolerance - 1e-6;
    const tooLong = gap.most !== undefined && elapsed > gap.most * per + tolerance + 1e-6;
    if (!tooShort && !tooLong) return [];
    return [
      {
        code: 'gapReversed',
        severity: 'stop',
        steps: [gap.from, gap.to],
        params: { gap: gap.id, from: gap.from, to: gap.to, elapsedMinutes: elapsed },
      },
    ];
  });
}
