import { daysBetween } from '../time/dates';
import { localDate } from '../time/zoned';
import type {
  AnimalClass,
  FactGap,
  Finding,
  FindingCode,
  LocalDate,
  PlannedVisit,
  ProtocolBody,
  Severity,
  Step,
  Zone,
} from '../types';
import { holds } from './conditions';

/** What is known of an animal that is to be enrolled. */
export interface Candidate {
  id: string;
  tag: string;
  class: AnimalClass;
  birth: LocalDate | null;
  lastCalving: LocalDate | null;
  lastService: LocalDate | null;
  /** true: known not pregnant; false: known pregnant; null: not known. */
  knownEmpty: boolean | null;
  otherCohort: string | null;
}

/** One reason against one animal. */
export interface Reason {
  code: FindingCode;
  severity: Severity;
  /** Days from the fact to the step, where they are the reason. */
  days?: number;
}

/** A rule of the protocol and whom it speaks against. */
interface Rule {
  code: FindingCode;
  severity: Severity;
  steps: string[];
  params: Finding['params'];
  source?: string;
  against: { animal: Candidate; days?: number }[];
}

/** How many tags a finding names; the count says the rest. */
const mostTags = 20;

/**
 * Which animals should not be started, and why: one finding for each rule, with up to 20 tags and the count.
 * Prostaglandin aborts a pregnant animal (UK product characteristics of cloprostenol, NOAH compendium), so every
 * animal that is to get it must be known empty.
 */
export const eligibility = (
  body: ProtocolBody,
  visits: readonly PlannedVisit[],
  animals: readonly Candidate[],
  zone: Zone,
): Finding[] => rules(body, visits, animals, zone).map(asFinding);

/** The same, animal by animal: reasons by the animal's id; an animal with nothing against it is not in it. */
export function reasonsByAnimal(
  body: ProtocolBody,
  visits: readonly PlannedVisit[],
  animals: readonly Candidate[],
  zone: Zone,
): Map<string, Reason[]> {
  const found = new Map<string, Reason[]>();
  for (const { code, severity, against } of rules(body, visits, animals, zone))
    for (const { animal, days } of against)
      found.set(animal.id, [
        ...(found.get(animal.id) ?? []),
        { code, severity, ...(days === undefined ? {} : { days }) },
      ]);
  return found;
}

const asFinding = ({ against, code, severity, steps, params, source }: Rule): Finding => {
  const days = against.flatMap((one) => one.days ?? []);
  return {
    code,
    severity,
    steps,
    params: {
      ...params,
      count: against.length,
      tags: against.slice(0, mostTags).map(({ animal }) => animal.tag),
      ...(days.length > 0 ? { fewestDays: Math.min(...days), greatestDays: Math.max(...days) } : {}),
    },
    ...(source === undefined ? {} : { source }),
  };
};

/** Rules that speak against at least one animal. */
function rules(body: ProtocolBody, visits: readonly PlannedVisit[], animals: readonly Candidate[], zone: Zone): Rule[] {
  const elsewhere = animals.filter((animal) => animal.otherCohort !== null);
  const all: Rule[] = [
    emptyRule(body, visits, animals),
    {
      code: 'wrongClass',
      severity: 'warn',
      steps: [],
      params: { classes: body.classes },
      against: animals.filter((a) => !body.classes.includes(a.class)).map((animal) => ({ animal })),
    },
    {
      code: 'inAnotherCohort',
      severity: 'stop',
      steps: [],
      params: { cohorts: [...new Set(elsewhere.map((a) => a.otherCohort ?? ''))] },
      against: elsewhere.map((animal) => ({ animal })),
    },
    ...body.factGaps.flatMap((gap) => factRules(gap, visits, animals, zone)),
  ];
  return all.filter((rule) => rule.against.length > 0);
}

const givesProstaglandin = (step: Step): boolean =>
  step.kind === 'prostaglandin' ||
  step.items.some((item) => item.active === 'dinoprost' || item.active === 'cloprostenol');

/** Against every animal that is not known empty and may get prostaglandin with the options of the plan. */
function emptyRule(body: ProtocolBody, visits: readonly PlannedVisit[], animals: readonly Candidate[]): Rule {
  const planned = new Set(visits.flatMap((visit) => visit.steps));
  const steps = body.steps.filter((step) => givesProstaglandin(step) && planned.has(step.id));
  const against = animals.filter(
    (a) => a.knownEmpty !== true && steps.some((step) => holds(step.when, { class: a.class }) !== false),
  );
  return {
    code: 'notKnownEmpty',
    severity: 'stop',
    steps: steps.map((step) => step.id),
    params: {},
    against: against.map((animal) => ({ animal })),
  };
}

const cowClasses: readonly AnimalClass[] = ['firstCalver', 'cow', 'dairyCow'];
const codes = { calving: 'daysSinceCalving', birth: 'tooYoung', lastService: 'daysSinceCalving' } as const;

/** Days from a fact to the named step, by local date; heifers have not calved and are not asked. */
function factRules(gap: FactGap, visits: readonly PlannedVisit[], animals: readonly Candidate[], zone: Zone): Rule[] {
  const visit = visits.find((v) => v.steps.includes(gap.to));
  if (!visit) return [];
  const due = localDate(visit.at, zone);
  const concerned = gap.fact === 'calving' ? animals.filter((a) => cowClasses.includes(a.class)) : animals;
  const dateOf = (a: Candidate) => ({ calving: a.lastCalving, birth: a.birth, lastService: a.lastService })[gap.fact];
  const outside = concerned.flatMap((animal) => {
    const date = dateOf(animal);
    if (date === null) return [];
    const days = daysBetween(date, due);
    return days < (gap.leastDays ?? -Infinity) || days > (gap.mostDays ?? Infinity) ? [{ animal, days }] : [];
  });
  const base = {
    severity: 'warn' as const,
    steps: [gap.to],
    ...(gap.source ? { source: gap.source } : {}),
    params: {
      fact: gap.fact,
      step: gap.to,
      ...(gap.leastDays === undefined ? {} : { leastDays: gap.leastDays }),
      ...(gap.mostDays === undefined ? {} : { mostDays: gap.mostDays }),
    },
  };
  const unknown = gap.fact === 'calving' ? concerned.filter((a) => dateOf(a) === null) : [];
  return [
    { ...base, code: codes[gap.fact], against: outside },
    { ...base, code: 'calvingUnknown', against: unknown.map((animal) => ({ animal })) },
  ];
}
