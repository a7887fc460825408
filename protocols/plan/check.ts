import type { Finding, ProtocolBody } from '../types';
import { checkReferences } from './checkReferences';
import { checkSources } from './checkSources';
import { combinationCount, observationCombinations, optionCombinations } from './conditions';
import { contradictions, type Met } from './contradictions';
import { minutesPerUnit } from './gaps';
import { nominalTimes, nominalVisits, solveNominal, type NominalVisit } from './nominal';
import { countOf } from './occurrences';
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
  /** Times through the yards with the default options, repeats counted. */
  yardings: number;
  /** Days from the first to the last visit with the default options, rounded up. */
  lengthDays: number;
}

/** Choices of options that are checked; more are refused rather than left unchecked in silence. */
const mostChoices = 256;

/**
 * Whether a protocol is possible, for every allowed choice of options and every branch; what is wrong in it and
 * where; and how long it is. Never throws: a body that makes no sense gives findings.
 */
export function checkProtocol(body: ProtocolBody): CheckResult {
  const findings = [...checkReferences(body), ...checkSources(body)];
  const scenarios: Scenario[] = [];
  const met: Met[] = [];
  const loose = new Map<string, Finding>();
  const judge = (resolved: Resolved, observed: Record<string, string>) => {
    const solution = solveNominal(resolved);
    const { options } = resolved;
    scenarios.push({ options, observed, consistent: solution.consistent, visits: nominalVisits(resolved) });
    if (!solution.consistent) met.push({ cycle: solution.cycle.map(({ bound }) => bound), options, observed });
    else keep(loose, idealsOutside(body, resolved));
  };
  for (const options of choices(body, findings)) {
    const together = resolve(body, options);
    keep(loose, unreachable(together));
    judge(together, {});
    if (body.observations.length === 0 || combinationCount(body.observations.map((o) => o.results)) > 8) continue;
    for (const observed of observationCombinations(body)) judge(resolve(body, options, { observed }), observed);
  }
  findings.push(...contradictions(body, met), ...loose.values());
  return { findings, scenarios, ...size(body, scenarios[0]) };
}

/** Every choice of options; too many are a stop, and then only the first ones are looked at. */
function choices(body: ProtocolBody, findings: Finding[]): Record<string, string>[] {
  const count = combinationCount(body.options.map((option) => option.values));
  if (count > mostChoices)
    findings.push({
      code: 'tooManyObservations',
      severity: 'stop',
      steps: [],
      params: { observations: body.observations.length, options: body.options.length, scenarios: count },
      path: 'options',
    });
  return optionCombinations(body, mostChoices);
}

function keep(into: Map<string, Finding>, found: readonly Finding[]): void {
  for (const finding of found) {
    const key = [finding.code, ...finding.steps, ...(finding.visits ?? [])].join('|');
    if (!into.has(key)) into.set(key, finding);
  }
}

function size(body: ProtocolBody, main: Scenario | undefined): Pick<CheckResult, 'yardings' | 'lengthDays'> {
  const visits = main?.visits ?? [];
  const yarded = new Set(body.visits.filter((visit) => visit.yarded).map((visit) => visit.id));
  const times = (visit: string) =>
    Math.max(1, ...body.steps.filter((step) => step.visit === visit).map((step) => countOf(step.repeat)));
  return {
    yardings: visits.filter(({ visit }) => yarded.has(visit)).reduce((sum, { visit }) => sum + times(visit), 0),
    lengthDays: Math.ceil((visits.at(-1)?.idealMinutes ?? 0) / 1440),
  };
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
function idealsOutside(body: ProtocolBody, resolved: Resolved): Finding[] {
  const times = nominalTimes(resolved);
  return resolved.gaps.flatMap(({ gap, from, to }): Finding[] => {
    const elapsed = (times.get(to) ?? 0) - (times.get(from) ?? 0);
    const per = minutesPerUnit[gap.unit];
    const tolerance = gap.unit === 'localDays' ? (gap.toleranceMinutes ?? 0) : 0;
    const tooShort = gap.least !== undefined && elapsed < gap.least * per - tolerance - 1e-6;
    const tooLong = gap.most !== undefined && elapsed > gap.most * per + tolerance + 1e-6;
    // a gap whose own figures are out of order has been named already
    if ((!tooShort && !tooLong) || (gap.least ?? -Infinity) > (gap.most ?? Infinity)) return [];
    return [
      {
        code: 'gapReversed',
        severity: 'stop',
        steps: [gap.from, gap.to],
        params: { gap: gap.id, from: gap.from, to: gap.to, elapsedMinutes: elapsed },
        path: `gaps.${body.gaps.indexOf(gap)}`,
      },
    ];
  });
}
