import type { Finding, ProtocolBody, Zone } from '@/protocols/types';
import { hasMessage, t, tData, type MessageParams } from './messages';
import { day, dayClock, duration } from './when';

/** What turns a finding's figures and ids into words. */
export interface FindingWords {
  /** Zone of the property: every instant is shown in it. Without one (a protocol has no zone) instants don't occur. */
  zone?: Zone;
  locale?: string;
  /** For the names of steps, visits and gaps; ids are shown as they are without it. */
  body?: ProtocolBody | null;
}

/** `{message, remedy}` of a finding: figures first, times in the property's zone. */
export function describeFinding(finding: Finding, words: FindingWords = {}): { message: string; remedy: string } {
  const params = namedParams(finding, words);
  const say = (part: 'message' | 'remedy') => {
    const key = `finding.${finding.code}.${part}`;
    return hasMessage(key) ? t(key, params, words.locale) : '';
  };
  return { message: say('message'), remedy: say('remedy') };
}

const textOf = (value: string | number | string[] | undefined): string =>
  Array.isArray(value) ? value.join(', ') : String(value ?? '');

function namedParams(finding: Finding, words: FindingWords): MessageParams {
  const raw = finding.params;
  const named = names(words.body);
  const out: MessageParams = { ...raw };
  for (const [key, value] of Object.entries(raw)) {
    if (key.endsWith('At') && typeof value === 'number')
      out[key.slice(0, -2)] = words.zone ? dayClock(value, words.zone, words.locale) : new Date(value).toISOString();
    else if (key.endsWith('Minutes') && typeof value === 'number') out[key.slice(0, -7)] = duration(value);
  }
  for (const key of ['step', 'from', 'to', 'visit', 'observation', 'option'] as const)
    if (typeof raw[key] === 'string') out[key] = named(raw[key]);
  for (const key of ['active', 'class'] as const)
    if (typeof raw[key] === 'string') out[key] = lowerFirst(tData(`${key}.${raw[key]}`, raw[key]));
  if (Array.isArray(raw.classes)) out.classes = raw.classes.map((c) => tData(`class.${c}`, c)).join(', ');
  return { ...out, ...special(finding, words, named) };
}

/** A word inside a sentence; names such as eCG, GnRH and FSH stay as they are. */
const lowerFirst = (word: string): string =>
  /^.[A-Z]|^[A-Z][a-z][A-Z]/.test(word) ? word : word.charAt(0).toLowerCase() + word.slice(1);

/** Names of steps, visits, gaps, observations by id. */
function names(body: ProtocolBody | null | undefined): (id: string) => string {
  const found = new Map<string, string>();
  for (const step of body?.steps ?? []) found.set(step.id, step.label ?? tData(`step.${step.kind}`, step.kind));
  for (const visit of body?.visits ?? []) if (!found.has(visit.id)) found.set(visit.id, visit.label);
  for (const seen of body?.observations ?? []) found.set(seen.id, seen.label);
  for (const option of body?.options ?? []) found.set(option.id, option.label);
  return (id) => found.get(id) ?? id;
}

/** Parts that are made of more than one figure. */
function special(finding: Finding, words: FindingWords, named: (id: string) => string): MessageParams {
  const { params } = finding;
  const number = (key: string) => (typeof params[key] === 'number' ? params[key] : undefined);
  const tags = Array.isArray(params.tags) ? params.tags : [];
  const more = (number('count') ?? 0) - tags.length;
  const visitLabel = (id: string) => words.body?.visits.find((v) => v.id === id)?.label ?? named(id);
  return {
    more: more > 0 && tags.length > 0 ? t('finding.more', { count: more }) : '',
    tagList: tags.length > 0 ? `: ${tags.join(', ')}${more > 0 ? t('finding.more', { count: more }) : ''}` : '',
    ...(typeof params.visit === 'string' ? { visit: visitLabel(params.visit) } : {}),
    ...(typeof params.fact === 'string'
      ? { fact: tData(`protocols.fact.${params.fact}`, params.fact).toLowerCase() }
      : {}),
    limits: limits(params),
    direction: (number('shiftMinutes') ?? 0) > 0 ? t('finding.forward') : t('finding.back'),
    shift: duration(Math.abs(number('shiftMinutes') ?? 0)),
    ...(number('lastAt') !== undefined && words.zone
      ? { lastDay: day(number('lastAt') ?? 0, words.zone, words.locale) }
      : {}),
    branch: branch(params, words.body),
    gapNames: gapNames(params.gaps, words.body, named),
  };
}

/** `52 h to 56 h`, `at least 50 days`. */
function limits(params: Finding['params']): string {
  const inDays = params.leastDays !== undefined || params.mostDays !== undefined;
  const [least, most] = inDays ? [params.leastDays, params.mostDays] : [params.leastMinutes, params.mostMinutes];
  const show = (n: number) => (inDays ? t('finding.daysWord', { count: n }) : duration(n));
  if (typeof least === 'number' && typeof most === 'number')
    return t('finding.between', { least: show(least), most: show(most) });
  if (typeof least === 'number') return t('finding.atLeast', { least: show(least) });
  if (typeof most === 'number') return t('finding.atMost', { most: show(most) });
  return '';
}

/** Which options and sightings a contradiction belongs to; empty when it stands in every branch. */
function branch(params: Finding['params'], body: ProtocolBody | null | undefined): string {
  const ids = [params.options, params.observed].flatMap((list) => (Array.isArray(list) ? list : []));
  const labels = [
    ...(body?.options.flatMap((o) => o.values) ?? []),
    ...(body?.observations.flatMap((o) => o.results) ?? []),
  ];
  const found = ids.map((id) => labels.find((label) => label.id === id)?.label ?? id);
  return found.length > 0 ? t('finding.branch', { names: found.join(', ') }) : '';
}

function gapNames(
  gaps: Finding['params'][string] | undefined,
  body: ProtocolBody | null | undefined,
  named: (id: string) => string,
): string {
  if (!Array.isArray(gaps)) return textOf(gaps);
  const list = gaps.map((id) => {
    const gap = body?.gaps.find((g) => g.id === id);
    return gap ? `${named(gap.from)} – ${named(gap.to)}` : id;
  });
  return list.join('; ');
}
