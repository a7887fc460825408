import type { StepKind } from '@/protocols/types';

/**
 * Keys of the cautions that stand where a step is done (`caution.*` in the catalogue).
 * Sources: UK product characteristics of cloprostenol and buserelin (NOAH compendium), 21 CFR 529.1940
 * (progesterone inserts), Directive 96/22/EC as amended by 2008/97/EC (oestradiol).
 */
const byKind: Partial<Record<StepKind, readonly string[]>> = {
  prostaglandin: ['prostaglandin'],
  gnrh: ['gnrh'],
  oestradiolBenzoate: ['oestradiol'],
  oestradiolCypionate: ['oestradiol'],
  oestradiolValerate: ['oestradiol'],
  ecg: ['ecg'],
  hcg: ['hcg'],
  deviceIn: ['device'],
  deviceOut: ['device'],
  progestagenFeed: ['melengestrol'],
  fixedTimeService: ['service'],
  serviceOnHeat: ['service'],
};

export const cautionsOf = (kind: StepKind): readonly string[] => byKind[kind] ?? [];
