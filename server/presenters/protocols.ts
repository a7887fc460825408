import { checkProtocol } from '@/protocols/plan/check';
import { idealOf } from '@/protocols/plan/gaps';
import type { Finding, ProtocolBody } from '@/protocols/types';
import type { LibrarySummary, VersionDetail } from '@/shared/contracts/protocols';
import { t, tData } from '@/shared/messages';
import { presentFindings } from './findings';

const figure = (n: number): string => String(Math.round(n * 10) / 10);

/** `60 to 66 h after device out`: the gap from the timing anchor (or a step of its visit) to the service. */
export function serviceInterval(body: ProtocolBody): string {
  const visitOf = (id: string) => body.steps.find((step) => step.id === id)?.visit;
  const [anchor, service] = [visitOf(body.timingAnchor), visitOf(body.serviceStep)];
  const gap = body.gaps.find((g) => visitOf(g.from) === anchor && visitOf(g.to) === service);
  const step = body.steps.find((s) => s.id === body.timingAnchor);
  if (!gap || !step) return '';
  const unit = gap.unit === 'localDays' ? 'd' : 'h';
  const range =
    gap.least !== undefined && gap.most !== undefined && gap.least !== gap.most
      ? `${figure(gap.least)} ${t('protocols.to')} ${figure(gap.most)}`
      : figure(idealOf(gap));
  const word = step.label ?? tData(`step.${step.kind}`, step.kind);
  return t('protocols.interval', { range: `${range} ${unit}`, step: word === 'GnRH' ? word : word.toLowerCase() });
}

export const presentLibrary = (id: string, body: ProtocolBody): LibrarySummary => {
  const check = checkProtocol(body);
  return {
    id,
    name: body.name,
    summary: body.summary,
    family: body.family,
    classes: body.classes,
    biology: body.biology,
    yardings: check.yardings,
    lengthDays: check.lengthDays,
    serviceInterval: serviceInterval(body),
    sources: body.sources.length,
    fromMemory: [...body.gaps, ...body.factGaps].some((gap) => gap.mark === 'memory'),
  };
};

/** Findings that stand in the way of signing off: stops, and amounts that nobody has written. */
export const signOffStops = (findings: readonly Finding[]): Finding[] =>
  findings.filter((finding) => finding.severity === 'stop' || finding.code === 'amountMissing');

export const findingsOf = (body: ProtocolBody): VersionDetail['findings'] =>
  presentFindings(checkProtocol(body).findings, { body });
