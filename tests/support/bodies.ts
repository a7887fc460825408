import type { Gap, ProtocolBody, Step } from '@/protocols/types';

/** Small protocol bodies for tests of the core: built by hand, not taken from the library. */

export const step = (id: string, kind: Step['kind'], visit: string, more: Partial<Step> = {}): Step => ({
  id,
  kind,
  visit,
  level: 'animal',
  items: [],
  ...more,
});

export const hours = (
  from: string,
  to: string,
  least: number,
  ideal: number,
  most: number,
  more: Partial<Gap> = {},
): Gap => ({
  id: `${from}-${to}`,
  from,
  to,
  unit: 'elapsedHours',
  least,
  ideal,
  most,
  ...more,
});

export const days = (from: string, to: string, n: number, toleranceMinutes = 60, more: Partial<Gap> = {}): Gap => ({
  id: `${from}-${to}`,
  from,
  to,
  unit: 'localDays',
  least: n,
  ideal: n,
  most: n,
  toleranceMinutes,
  ...more,
});

export const body = (part: Partial<ProtocolBody>): ProtocolBody => ({
  schema: 1,
  name: 'Test protocol',
  summary: 'For tests',
  family: 'gnrhDevice',
  classes: ['heifer'],
  biology: 'taurus',
  options: [],
  observations: [],
  visits: [],
  steps: [],
  gaps: [],
  factGaps: [],
  deadlines: [],
  timingAnchor: '',
  serviceStep: '',
  exits: [],
  sources: [],
  notes: [],
  ...part,
});

/** Device in with GnRH, seven local days, device out with prostaglandin, service `least` to `most` hours later. */
export const sevenDay = (least = 52, ideal = 54, most = 56, more: Partial<ProtocolBody> = {}): ProtocolBody =>
  body({
    visits: [
      { id: 'in', label: 'Devices in', yarded: true },
      { id: 'out', label: 'Devices out', yarded: true },
      { id: 'ai', label: 'AI', yarded: true },
    ],
    steps: [
      step('deviceIn', 'deviceIn', 'in', {
        items: [{ active: 'progesterone', amount: 1, unit: 'device', per: 'head', route: 'intravaginal' }],
      }),
      step('gnrh1', 'gnrh', 'in', {
        items: [{ active: 'gonadorelin', amount: 100, unit: 'ug', per: 'head', route: 'im' }],
      }),
      step('deviceOut', 'deviceOut', 'out'),
      step('pg', 'prostaglandin', 'out', {
        items: [{ active: 'dinoprost', amount: 25, unit: 'mg', per: 'head', route: 'im' }],
      }),
      step('service', 'fixedTimeService', 'ai'),
      step('gnrh2', 'gnrh', 'ai', {
        items: [{ active: 'gonadorelin', amount: 100, unit: 'ug', per: 'head', route: 'im' }],
      }),
    ],
    gaps: [days('deviceIn', 'deviceOut', 7), hours('deviceOut', 'service', least, ideal, most)],
    timingAnchor: 'deviceOut',
    serviceStep: 'service',
    ...more,
  });
