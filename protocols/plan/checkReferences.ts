import type { Condition, Finding, FindingCode, Gap, ProtocolBody } from '../types';

/** Whether everything that a body names is there, and every figure makes sense by itself. Paths point into the body. */
export function checkReferences(body: ProtocolBody): Finding[] {
  return [
    ...(body.name.trim() ? [] : [stop('nameMissing', 'name')]),
    ...duplicates(body),
    ...stepFindings(body),
    ...gapFindings(body),
    ...checkClocks(body),
    ...choiceFindings(body),
    ...anchorFindings(body),
    ...outsideFindings(body),
    ...visitFindings(body),
    ...observationFindings(body),
  ];
}

const stop = (code: FindingCode, path: string, params: Finding['params'] = {}, steps: string[] = []): Finding => ({
  code,
  severity: 'stop',
  steps,
  params,
  path,
});

function duplicates(body: ProtocolBody): Finding[] {
  const lists = {
    steps: body.steps,
    visits: body.visits,
    gaps: body.gaps,
    options: body.options,
    observations: body.observations,
    factGaps: body.factGaps,
    deadlines: body.deadlines,
  };
  return Object.entries(lists).flatMap(([name, list]) => {
    const seen = new Set<string>();
    return list.flatMap(({ id }, i) => {
      const again = seen.has(id);
      seen.add(id);
      return again ? [stop('duplicateId', `${name}.${i}.id`, { id })] : [];
    });
  });
}

function stepFindings(body: ProtocolBody): Finding[] {
  const visits = new Set(body.visits.map((visit) => visit.id));
  return body.steps.flatMap((step, i) => [
    ...(visits.has(step.visit) ? [] : [stop('unknownVisit', `steps.${i}.visit`, { visit: step.visit }, [step.id])]),
    ...conditionFindings(step.when, body, `steps.${i}.when`, step.id),
    ...(step.observe && !body.observations.some((o) => o.id === step.observe)
      ? [stop('unknownObservation', `steps.${i}.observe`, { observation: step.observe }, [step.id])]
      : []),
    ...step.items.flatMap((item, k): Finding[] =>
      item.amount === undefined && !item.byClass
        ? [
            {
              code: 'amountMissing',
              severity: 'warn',
              steps: [step.id],
              params: { step: step.id, active: item.active },
              path: `steps.${i}.items.${k}.amount`,
            },
          ]
        : [],
    ),
  ]);
}

function conditionFindings(when: Condition | undefined, body: ProtocolBody, path: string, step: string): Finding[] {
  if (!when) return [];
  if ('all' in when) return when.all.flatMap((c) => conditionFindings(c, body, path, step));
  if ('any' in when) return when.any.flatMap((c) => conditionFindings(c, body, path, step));
  if ('not' in when) return conditionFindings(when.not, body, path, step);
  if ('class' in when) return [];
  if ('option' in when) {
    const option = body.options.find((o) => o.id === when.option);
    return option?.values.some((v) => v.id === when.is)
      ? []
      : [stop('unknownOption', path, { option: when.option, value: when.is }, [step])];
  }
  const seen = body.observations.find((o) => o.id === when.observed);
  return seen?.results.some((r) => r.id === when.is)
    ? []
    : [stop('unknownObservation', path, { observation: when.observed, value: when.is }, [step])];
}

/** Steps of one visit are done at the same moment: a gap between them must allow that. */
const holdsZero = ({ least, ideal, most }: Gap): boolean =>
  (least ?? 0) <= 0 && (most ?? 0) >= 0 && (ideal === undefined || ideal === 0);

const clockPattern = /^([01]\d|2[0-3]):[0-5]\d$/;

/** Gaps with a clock time that is none. */
export const checkClocks = (body: Pick<ProtocolBody, 'gaps'>): Finding[] =>
  body.gaps.flatMap((gap, i) =>
    gap.clock === undefined || clockPattern.test(gap.clock)
      ? []
      : [stop('badClock', `gaps.${i}.clock`, { gap: gap.id, clock: gap.clock }, [gap.from, gap.to])],
  );

const figuresOf = ({ id, from, to, least, ideal, most }: Gap) => ({
  gap: id,
  from,
  to,
  least: least ?? '',
  ideal: ideal ?? '',
  most: most ?? '',
});

function gapFindings(body: ProtocolBody): Finding[] {
  const steps = new Map(body.steps.map((step) => [step.id, step]));
  return body.gaps.flatMap((gap, i): Finding[] => {
    const path = `gaps.${i}`;
    const { least, ideal, most } = gap;
    const found: Finding[] = [];
    for (const end of ['from', 'to'] as const)
      if (!steps.has(gap[end])) found.push(stop('unknownStep', `${path}.${end}`, { step: gap[end] }));
    const [a, b] = [steps.get(gap.from), steps.get(gap.to)];
    if (gap.from === gap.to || (a && b && a.visit === b.visit && !holdsZero(gap)))
      found.push(stop('gapReversed', `${path}.to`, { gap: gap.id, from: gap.from, to: gap.to }, [gap.from, gap.to]));
    if (least === undefined && ideal === undefined && most === undefined)
      found.push(stop('gapEmpty', path, { gap: gap.id, from: gap.from, to: gap.to }, [gap.from, gap.to]));
    if (least !== undefined && most !== undefined && least > most)
      found.push(stop('gapBounds', `${path}.most`, figuresOf(gap), [gap.from, gap.to]));
    else if (ideal !== undefined && (ideal < (least ?? ideal) || ideal > (most ?? ideal)))
      found.push(stop('gapBounds', `${path}.ideal`, figuresOf(gap), [gap.from, gap.to]));
    found.push(...conditionFindings(gap.when, body, `${path}.when`, gap.from));
    return found;
  });
}

function anchorFindings(body: ProtocolBody): Finding[] {
  const known = new Set(body.steps.map((step) => step.id));
  return [
    ...(known.has(body.timingAnchor) ? [] : [stop('anchorMissing', 'timingAnchor', { step: body.timingAnchor })]),
    ...(known.has(body.serviceStep) ? [] : [stop('noService', 'serviceStep', { step: body.serviceStep })]),
    ...body.factGaps.flatMap((gap, i) =>
      known.has(gap.to) ? [] : [stop('unknownStep', `factGaps.${i}.to`, { step: gap.to })],
    ),
    ...body.deadlines.flatMap((deadline, i) =>
      known.has(deadline.step) ? [] : [stop('unknownStep', `deadlines.${i}.step`, { step: deadline.step })],
    ),
    ...Object.keys(body.lateChoices ?? {}).flatMap((step) =>
      known.has(step) ? [] : [stop('unknownStep', `lateChoices.${step}`, { step })],
    ),
  ];
}

/** Defaults and answers for the unknown that are none of the choices. */
function choiceFindings(body: ProtocolBody): Finding[] {
  return [
    ...body.options.flatMap((option, i) =>
      option.values.some((value) => value.id === option.default)
        ? []
        : [stop('unknownOption', `options.${i}.default`, { option: option.id, value: option.default })],
    ),
    ...body.observations.flatMap((seen, i) =>
      seen.onUnknown === 'askVet' || seen.results.some((result) => result.id === seen.onUnknown)
        ? []
        : [stop('unknownObservation', `observations.${i}.onUnknown`, { observation: seen.id, value: seen.onUnknown })],
    ),
  ];
}

/** Figures of gaps from facts of the animal and from outside events. */
function outsideFindings(body: ProtocolBody): Finding[] {
  const wrong = (path: string, id: string, from: string, to: string, ...figures: (number | undefined)[]): Finding[] => {
    const [least, ideal, most] = figures;
    const known = figures.filter((figure) => figure !== undefined);
    if (known.length === 0) return [stop('gapEmpty', path, { gap: id, from, to }, [to])];
    return known.every((figure, k) => k === 0 || figure >= (known[k - 1] ?? figure))
      ? []
      : [
          stop('gapBounds', path, { gap: id, from, to, least: least ?? '', ideal: ideal ?? '', most: most ?? '' }, [
            to,
          ]),
        ];
  };
  return [
    ...body.factGaps.flatMap((gap, i) =>
      wrong(`factGaps.${i}`, gap.id, gap.fact, gap.to, gap.leastDays, undefined, gap.mostDays),
    ),
    ...body.deadlines.flatMap((d, i) =>
      wrong(`deadlines.${i}`, d.id, d.event, d.step, d.leastHours, d.idealHours, d.mostHours),
    ),
  ];
}

const visitFindings = (body: ProtocolBody): Finding[] =>
  body.visits.flatMap((visit, i) =>
    body.steps.some((step) => step.visit === visit.id)
      ? []
      : [{ ...stop('emptyVisit', `visits.${i}`, { visit: visit.id }), visits: [visit.id] }],
  );

function observationFindings(body: ProtocolBody): Finding[] {
  const scenarios = body.observations.reduce((n, seen) => n * seen.results.length, 1);
  const tooMany = body.observations.length > 3 || scenarios > 8;
  const unused = body.observations.flatMap((seen, i): Finding[] =>
    body.steps.some((step) => step.observe === seen.id)
      ? []
      : [
          {
            code: 'observationUnused',
            severity: 'warn',
            steps: [],
            params: { observation: seen.id },
            path: `observations.${i}`,
          },
        ],
  );
  return tooMany
    ? [stop('tooManyObservations', 'observations', { observations: body.observations.length, scenarios }), ...unused]
    : unused;
}
