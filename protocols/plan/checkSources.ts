import type { AnimalClass, Finding, ProtocolBody, Step } from '../types';
import { holds } from './conditions';

const oestradiols: readonly string[] = ['oestradiolBenzoate', 'oestradiolCypionate', 'oestradiolValerate'];
const adultClasses: readonly AnimalClass[] = ['cow', 'firstCalver', 'dairyCow'];

/** What a vet should see before signing off: figures that no source gives, and law that depends on the country. */
export const checkSources = (body: ProtocolBody): Finding[] => [
  ...ownTolerances(body),
  ...recalledFigures(body),
  ...oestradiolSteps(body),
  ...melengestrolForCows(body),
];

const ownTolerances = (body: ProtocolBody): Finding[] =>
  body.gaps.flatMap((gap, i): Finding[] => {
    const { toleranceMinutes = 0 } = gap;
    if (gap.unit !== 'localDays' || !(toleranceMinutes > 0) || gap.toleranceMark !== undefined) return [];
    return [
      {
        code: 'toleranceNotInSource',
        severity: 'note',
        steps: [gap.from, gap.to],
        params: { gap: gap.id, from: gap.from, to: gap.to, toleranceMinutes },
        path: `gaps.${i}.toleranceMinutes`,
      },
    ];
  });

function recalledFigures(body: ProtocolBody): Finding[] {
  const recalled = [...body.gaps, ...body.factGaps, ...body.deadlines].filter((gap) => gap.mark === 'memory');
  if (recalled.length === 0) return [];
  const params = { count: recalled.length, gaps: recalled.map((gap) => gap.id) };
  return [{ code: 'fromMemory', severity: 'note', steps: [], params }];
}

/** By what is given, not only by the kind of the step: an item under another kind is as unlawful. */
const gives = (step: Step, actives: readonly string[]): boolean =>
  step.items.some((item) => actives.includes(item.active));

function oestradiolSteps(body: ProtocolBody): Finding[] {
  const steps = body.steps.filter((step) => oestradiols.includes(step.kind) || gives(step, oestradiols));
  if (steps.length === 0) return [];
  return [
    {
      code: 'oestradiolLaw',
      severity: 'warn',
      steps: steps.map((step) => step.id),
      params: {},
      source: 'Directive 96/22/EC as amended by 2008/97/EC (Official Journal of the European Union, 2008)',
    },
  ];
}

function melengestrolForCows(body: ProtocolBody): Finding[] {
  const fed = body.steps.filter((step) => gives(step, ['melengestrolAcetate']));
  const classes = body.classes.filter(
    (c) => adultClasses.includes(c) && fed.some((step) => holds(step.when, { class: c }) !== false),
  );
  if (classes.length === 0) return [];
  return [
    {
      code: 'progestagenFeedAdultCows',
      severity: 'stop',
      steps: fed.map((step) => step.id),
      params: { classes },
      path: 'classes',
      source: 'Estrus synchronization notes (University of Missouri Extension)',
    },
  ];
}
