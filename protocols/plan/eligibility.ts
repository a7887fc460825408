import { daysBetween } from '../time/dates';
import { localDate } from '../time/zoned';
import type { AnimalClass, FactGap, Finding, LocalDate, PlannedVisit, ProtocolBody, Zone } from '../types';

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

/** How many tags a finding names; the count says the rest. */
const mostTags = 20;

/**
 * Which animals should not be started, and why. Prostaglandin aborts a pregnant animal (UK product characteristics
 * of cloprostenol, NOAH compendium), so every animal that is to get it must be known empty.
 */
export function eligibility(
  body: ProtocolBody,
  visits: readonly PlannedVisit[],
  animals: readonly Candidate[],
  zone: Zone,
): Finding[] {
  const pg = body.steps.filter((step) => step.kind === 'prostaglandin').map((step) => step.id);
  const found = (
    code: Finding['code'],
    severity: Finding['severity'],
    steps: string[],
    who: readonly Candidate[],
    params = {},
  ) =>
    who.length === 0
      ? []
      : [
          {
            code,
            severity,
            steps,
            params: { count: who.length, tags: who.slice(0, mostTags).map((a) => a.tag), ...params },
          },
        ];
  const elsewhere = animals.filter((a) => a.otherCohort !== null);
  return [
    ...(pg.length > 0
      ? found(
          'notKnownEmpty',
          'stop',
          pg,
          animals.filter((a) => a.knownEmpty !== true),
        )
      : []),
    ...found(
      'wrongClass',
      'warn',
      [],
      animals.filter((a) => !body.classes.includes(a.class)),
      { classes: body.classes },
    ),
    ...found('inAnotherCohort', 'stop', [], elsewhere, {
      cohorts: [...new Set(elsewhere.map((a) => a.otherCohort ?? ''))],
    }),
    ...body.factGaps.flatMap((gap) => factFindings(gap, body, visits, animals, zone)),
  ];
}

const cowClasses: readonly AnimalClass[] = ['firstCalver', 'cow', 'dairyCow'];
const codes = { calving: 'daysSinceCalving', birth: 'tooYoung', lastService: 'daysSinceCalving' } as const;

function factFindings(
  gap: FactGap,
  body: ProtocolBody,
  visits: readonly PlannedVisit[],
  animals: readonly Candidate[],
  zone: Zone,
): Finding[] {
  const visit = visits.find((v) => v.steps.includes(gap.to));
  if (!visit) return [];
  const due = localDate(visit.at, zone);
  const concerned = gap.fact === 'calving' ? animals.filter((a) => cowClasses.includes(a.class)) : animals;
  const dateOf = (a: Candidate) => ({ calving: a.lastCalving, birth: a.birth, lastService: a.lastService })[gap.fact];
  const unknown = gap.fact === 'calving' ? concerned.filter((a) => dateOf(a) === null) : [];
  const outside = concerned.flatMap((a) => {
    const date = dateOf(a);
    if (date === null) return [];
    const days = daysBetween(date, due);
    return days < (gap.leastDays ?? -Infinity) || days > (gap.mostDays ?? Infinity) ? [{ tag: a.tag, days }] : [];
  });
  const base = { steps: [gap.to], ...(gap.source ? { source: gap.source } : {}) };
  const figures = {
    fact: gap.fact,
    step: gap.to,
    ...(gap.leastDays === undefined ? {} : { leastDays: gap.leastDays }),
    ...(gap.mostDays === undefined ? {} : { mostDays: gap.mostDays }),
  };
  return [
    ...(outside.length === 0
      ? []
      : [
          {
            ...base,
            code: codes[gap.fact],
            severity: 'warn' as const,
            params: {
              ...figures,
              count: outside.length,
              tags: outside.slice(0, mostTags).map((a) => a.tag),
              fewestDays: Math.min(...outside.map((a) => a.days)),
            },
          },
        ]),
    ...(unknown.length === 0
      ? []
      : [
          {
            ...base,
            code: 'calvingUnknown' as const,
            severity: 'warn' as const,
            params: { ...figures, count: unknown.length, tags: unknown.slice(0, mostTags).map((a) => a.tag) },
          },
        ]),
  ];
}
