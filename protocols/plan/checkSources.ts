import type { Finding, ProtocolBody } from '../types';

const oestradiols = ['oestradiolBenzoate', 'oestradiolCypionate', 'oestradiolValerate'];

/** What a vet should see before signing off: figures that no source gives, and law that depends on the country. */
export function checkSources(body: ProtocolBody): Finding[] {
  const ownTolerance = body.gaps.filter(
    (gap) => gap.unit === 'localDays' && (gap.toleranceMinutes ?? 0) > 0 && gap.toleranceMark === undefined,
  );
  const recalled = [...body.gaps, ...body.factGaps].filter((gap) => gap.mark === 'memory');
  const oestradiol = body.steps.filter((step) => oestradiols.includes(step.kind));
  const fed = body.steps.filter((step) => step.items.some((item) => item.active === 'melengestrolAcetate'));
  const adults = body.classes.filter((c) => c === 'cow' || c === 'firstCalver' || c === 'dairyCow');
  return [
    ...ownTolerance.map((gap): Finding => ({
      code: 'toleranceNotInSource',
      severity: 'note',
      steps: [gap.from, gap.to],
      params: { gap: gap.id, from: gap.from, to: gap.to, toleranceMinutes: gap.toleranceMinutes ?? 0 },
      path: `gaps.${body.gaps.indexOf(gap)}.toleranceMinutes`,
    })),
    ...(recalled.length === 0
      ? []
      : [
          {
            code: 'fromMemory' as const,
            severity: 'note' as const,
            steps: [],
            params: { count: recalled.length, gaps: recalled.map((gap) => gap.id) },
          },
        ]),
    ...(oestradiol.length === 0
      ? []
      : [
          {
            code: 'oestradiolLaw' as const,
            severity: 'warn' as const,
            steps: oestradiol.map((step) => step.id),
            params: {},
            source: 'Directive 96/22/EC as amended by 2008/97/EC (Official Journal of the European Union, 2008)',
          },
        ]),
    ...(fed.length === 0 || adults.length === 0
      ? []
      : [
          {
            code: 'progestagenFeedAdultCows' as const,
            severity: 'stop' as const,
            steps: fed.map((step) => step.id),
            params: { classes: adults },
            path: 'classes',
            source: 'Estrus synchronization notes (University of Missouri Extension)',
          },
        ]),
  ];
}
