import { holds } from '@/protocols/plan/conditions';
import { dosesOf, type Dose } from '@/protocols/plan/doses';
import { resolve } from '@/protocols/plan/resolve';
import type { AnimalClass, PlannedVisit, ProtocolBody, Step } from '@/protocols/types';
import { cautionsOf } from '@/shared/cautions';
import { conditionWords } from '@/shared/conditions';
import type { TaskStep } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';
import type { AuthorityUse } from '../queries/authorityUse';

/** What a task of one visit of one group says: title, steps, doses, cautions. */
export interface TaskWords {
  title: string;
  yarded: boolean;
  steps: TaskStep[];
  anchorLabel: string;
}

export const stepLabel = (step: Step): string => step.label ?? tData(`step.${step.kind}`, step.kind);

/** Millilitres or pieces of a product that hold an amount; null when no product is chosen or units differ. */
export function volumeOf(dose: Dose, authorities: readonly AuthorityUse[]): string | null {
  const product = authorities.find((a) => a.active === dose.active && a.strength !== null && a.withdrawnAt === null);
  if (!product?.strength || dose.amount === null || product.unit !== dose.unit) return null;
  const n = Math.round((dose.amount / product.strength) * 100) / 100;
  return product.per === 'mL' ? `${n} mL` : `${n}`;
}

/** The steps of a visit that may apply to a class, with doses for that many head. */
export function taskSteps(
  body: ProtocolBody,
  options: Record<string, string>,
  stepIds: readonly string[],
  group: { class: AnimalClass; head: number },
  authorities: readonly AuthorityUse[],
  occurrence = 1,
): TaskStep[] {
  return body.steps
    .filter((step) => stepIds.includes(step.id) && holds(step.when, { options, class: group.class }) !== false)
    .map((step) => ({
      id: step.id,
      kind: step.kind,
      label: stepLabel(step),
      level: step.level,
      condition:
        step.when && holds(step.when, { options, class: group.class }) === undefined
          ? conditionWords(step.when, body)
          : null,
      ...(step.when ? { when: step.when } : {}),
      ...observationOf(step, body),
      doses: dosesOf(step, group.class, group.head, undefined, occurrence).map((dose) => ({
        ...dose,
        volume: volumeOf(dose, authorities),
      })),
      cautions: [...cautionsOf(step.kind)],
    }));
}

const observationOf = (step: Step, body: ProtocolBody) => {
  const seen = body.observations.find((observation) => observation.id === step.observe);
  return seen ? { observation: seen } : {};
};

export function taskWords(
  body: ProtocolBody,
  visit: PlannedVisit,
  repeats: number,
  group: { class: AnimalClass; head: number },
  options: Record<string, string>,
  authorities: readonly AuthorityUse[],
): TaskWords {
  const about = body.visits.find((v) => v.id === visit.visit);
  const label = about?.label ?? visit.visit;
  const anchor = body.steps.find((step) => step.id === body.timingAnchor);
  return {
    title: repeats > 1 ? t('cohorts.titleOf', { title: label, n: visit.occurrence, count: repeats }) : label,
    yarded: about?.yarded ?? true,
    steps: taskSteps(body, options, visit.steps, group, authorities, visit.occurrence),
    anchorLabel: anchor ? stepLabel(anchor) : '',
  };
}

/** Steps of the chosen options, for labels and repeats. */
export const chosenOptions = (body: ProtocolBody, given: Record<string, string>): Record<string, string> =>
  resolve(body, given).options;
