import type { Active, Item, Step, StepKind } from '@/protocols/types';

/**
 * What a new step of a kind begins with: the usual active and route, never an amount: that is the vet's to write.
 * Routes: common practice, no source.
 */
const firstItem: Partial<Record<StepKind, Pick<Item, 'active' | 'unit' | 'route'>>> = {
  deviceIn: { active: 'progesterone', unit: 'device', route: 'intravaginal' },
  prostaglandin: { active: 'dinoprost', unit: 'mg', route: 'im' },
  gnrh: { active: 'gonadorelin', unit: 'ug', route: 'im' },
  hcg: { active: 'hcg', unit: 'iu', route: 'im' },
  oestradiolBenzoate: { active: 'oestradiolBenzoate', unit: 'mg', route: 'im' },
  oestradiolCypionate: { active: 'oestradiolCypionate', unit: 'mg', route: 'im' },
  oestradiolValerate: { active: 'oestradiolValerate', unit: 'mg', route: 'im' },
  ecg: { active: 'ecg', unit: 'iu', route: 'im' },
  fsh: { active: 'fsh', unit: 'mg', route: 'im' },
  progestagenFeed: { active: 'melengestrolAcetate', unit: 'mg', route: 'oral' },
  heatAidOn: { active: 'heatAid', unit: 'patch', route: 'topical' },
  vaccination: { active: 'vaccine', unit: 'dose', route: 'sc' },
};

const groupKinds: readonly StepKind[] = [
  'progestagenFeed',
  'heatRound',
  'calvesOff',
  'calvesBack',
  'bullIn',
  'bullOut',
  'bullTest',
  'move',
];

/** Actives that a kind of step may give; the first is the usual one. Empty: nothing is given. */
export const activesOf: Partial<Record<StepKind, readonly Active[]>> = {
  deviceIn: ['progesterone'],
  prostaglandin: ['dinoprost', 'cloprostenol'],
  gnrh: ['gonadorelin', 'buserelin'],
  hcg: ['hcg'],
  oestradiolBenzoate: ['oestradiolBenzoate'],
  oestradiolCypionate: ['oestradiolCypionate'],
  oestradiolValerate: ['oestradiolValerate'],
  ecg: ['ecg'],
  fsh: ['fsh'],
  progesterone: ['progesterone'],
  progestagenFeed: ['melengestrolAcetate'],
  heatAidOn: ['heatAid'],
  vaccination: ['vaccine'],
};

export const newItems = (kind: StepKind): Item[] => {
  const first = firstItem[kind];
  if (!first) return [];
  const whole = first.unit === 'device' || first.unit === 'patch';
  return [{ ...first, per: 'head', ...(whole ? { amount: 1 } : {}) }];
};

export const newStep = (id: string, kind: StepKind, visit: string): Step => ({
  id,
  kind,
  visit,
  level: groupKinds.includes(kind) ? 'group' : 'animal',
  items: newItems(kind),
});
