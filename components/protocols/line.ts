import { checkProtocol } from '@/protocols/plan/check';
import type { ProtocolBody } from '@/protocols/types';
import type { GapLineVisit } from '../charts/GapLine';
import type { LineGap } from '../charts/gapLineLayout';
import { boundWords, gapWords, shortStep } from './edit/words';

/** The protocol as a line, with the default options: visits with their windows, gaps with their words. */
export function lineOf(body: ProtocolBody): { visits: GapLineVisit[]; gaps: LineGap[] } {
  const main = checkProtocol(body).scenarios[0];
  const visits = (main?.visits ?? []).map((nominal): GapLineVisit => {
    const steps = body.steps.filter((step) => step.visit === nominal.visit);
    return {
      id: nominal.visit,
      label: body.visits.find((visit) => visit.id === nominal.visit)?.label ?? nominal.visit,
      minutes: nominal.idealMinutes,
      earliest: nominal.earliestMinutes,
      latest: nominal.latestMinutes,
      lines: steps.map((step) => ({ key: step.id, text: shortStep(step) })),
      kinds: steps.map((step) => step.kind),
    };
  });
  const shown = new Set(visits.map((visit) => visit.id));
  const visitOf = (step: string) => body.steps.find((s) => s.id === step)?.visit ?? '';
  const gaps = body.gaps.flatMap((gap): LineGap[] => {
    const [from, to] = [visitOf(gap.from), visitOf(gap.to)];
    return from !== to && shown.has(from) && shown.has(to)
      ? [{ id: gap.id, from, to, label: gapWords(gap), short: boundWords(gap, 'ideal') }]
      : [];
  });
  return { visits, gaps };
}
