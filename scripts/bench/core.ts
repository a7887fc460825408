import { findLibrary, library } from '@/protocols/library';
import { checkProtocol } from '@/protocols/plan/check';
import { expand, visitOfStep } from '@/protocols/plan/expand';
import { toInstant } from '@/protocols/time/zoned';
import type { ProtocolBody } from '@/protocols/types';

import type { Row } from './table';

const second = 1000;

/** How often per second, over about a second, after a second of warming up. */
export function perSecond(work: () => unknown, milliseconds = second): number {
  const run = (until: number) => {
    let times = 0;
    const began = performance.now();
    while (performance.now() - began < until) {
      for (let at = 0; at < 10; at += 1) work();
      times += 10;
    }
    return (times * second) / (performance.now() - began);
  };
  run(milliseconds);
  return run(milliseconds);
}

/** Anchored at its first service, across a change of the clocks. */
function expansion(body: ProtocolBody): () => unknown {
  const zone = 'Australia/Sydney';
  const service =
    body.steps.find(({ kind }) => kind === 'fixedTimeService' || kind === 'serviceOnHeat') ?? body.steps[0];
  const visit = visitOfStep(body, service?.id ?? '') ?? '';
  const { at } = toInstant('2026-10-05T09:00', zone);
  return () => expand(body, { zone, fix: { visit, at } });
}

/** The core's speed, beside copying the same protocol by JSON in the same run. */
export function coreRows(): Row[] {
  const longest = library.map(({ body }) => body).reduce((a, b) => (daysOf(b) > daysOf(a) ? b : a));
  const sevenDay = findLibrary('device-7-heifers')?.body ?? longest;
  return [...new Set([sevenDay, longest])].flatMap((body) => {
    const copies = perSecond(() => JSON.parse(JSON.stringify(body)) as unknown);
    const row = (what: string, value: number): Row => ({
      what: `${what}: ${body.name} (${daysOf(body)} days)`,
      value,
      unit: '/s',
      ratio: value / copies,
      beside: 'copies of it by JSON',
    });
    return [
      row('expand', perSecond(expansion(body))),
      row(
        'checkProtocol',
        perSecond(() => checkProtocol(body)),
      ),
    ];
  });
}

const daysOf = (body: ProtocolBody) => checkProtocol(body).lengthDays;
