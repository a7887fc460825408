import type { ProtocolBody } from '../types';
import { days, deviceIn, deviceOut, ecg, gnrh, hours, patchOn, pg, protocol, service, source, yarding } from './parts';
import { aabp2009, arkansas, gunn, kstate, ndsu, oosthuizen, sdsuPostpartum, taskForce, teagasc } from './sources';

const calving50 = {
  id: 'calving',
  fact: 'calving' as const,
  to: 'deviceIn',
  leastDays: 50,
  source: sdsuPostpartum,
  mark: 'read' as const,
};

/** Device in with GnRH, seven days, out with prostaglandin, service with GnRH: beef cows. */
export const sevenDayCows: ProtocolBody = protocol({
  name: '7-day device, beef cows, 60 to 66 h',
  summary:
    'GnRH and device, seven days later device out with prostaglandin, AI with GnRH at a fixed time. Three yardings.',
  family: 'gnrhDevice',
  classes: ['cow', 'firstCalver'],
  biology: 'taurus',
  visits: [yarding('in', 'Devices in'), yarding('out', 'Devices out'), yarding('ai', 'AI')],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    gnrh('gnrh1', 'in', 100),
    deviceOut('out', { sourceLabel: 'Day 7' }),
    pg('pg', 'out', 25),
    patchOn('out'),
    service('service', 'ai'),
    gnrh('gnrh2', 'ai', 100),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 7, { source: 'ndsu', mark: 'read' }),
    hours('deviceOut', 'service', 60, 63, 66, { source: 'ndsu', mark: 'read' }),
  ],
  factGaps: [calving50],
  timingAnchor: 'deviceOut',
  serviceStep: 'service',
  sources: [ndsu, kstate, taskForce],
  notes: ['GnRH at AI adds nothing for cows already in heat (Hill, Kansas State University, 2013; read).'],
});

/** The same for heifers, with the shorter interval. */
export const sevenDayHeifers: ProtocolBody = protocol({
  ...sevenDayCows,
  name: '7-day device, beef heifers, 54 h',
  summary: 'GnRH and device, seven days later device out with prostaglandin, AI with GnRH 54 h after. Three yardings.',
  classes: ['heifer'],
  gaps: [
    days('deviceIn', 'deviceOut', 7, { source: 'oosthuizen', mark: 'read' }),
    hours('deviceOut', 'service', 52, 54, 56, {
      source: 'oosthuizen',
      mark: 'memory',
      note: '54 h is read; the 2 h either side are the task force’s, from memory.',
    }),
  ],
  factGaps: [],
  sources: [oosthuizen, taskForce],
  notes: ['Sources differ: 54 h, 60 h and, after presynchronisation, 72 h have been published.'],
});

const secondPg = {
  id: 'secondPg',
  label: 'Second prostaglandin',
  values: [
    { id: 'h8', label: '8 h after the first' },
    { id: 'h12', label: '12 h after the first' },
  ],
  default: 'h8',
};

/** Five days, two doses of prostaglandin. */
export const fiveDayCows: ProtocolBody = protocol({
  name: '5-day device, beef cows, 72 h',
  summary:
    'GnRH and device, five days later device out with prostaglandin and a second dose hours later, AI 72 h after removal. Four yardings.',
  family: 'gnrhDevice',
  classes: ['cow', 'firstCalver'],
  biology: 'taurus',
  options: [secondPg],
  visits: [
    yarding('in', 'Devices in'),
    yarding('out', 'Devices out'),
    yarding('pg2', 'Second prostaglandin'),
    yarding('ai', 'AI'),
  ],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    gnrh('gnrh1', 'in', 100),
    deviceOut('out', { sourceLabel: 'Day 5' }),
    pg('pg1', 'out', 25),
    pg('pg2', 'pg2', 25),
    service('service', 'ai'),
    gnrh('gnrh2', 'ai', 100),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 5, { source: 'gunn', mark: 'read' }),
    {
      ...hours('pg1', 'pg2', 6, 8, 10, { source: 'brtf', mark: 'memory', when: { option: 'secondPg', is: 'h8' } }),
      id: 'pg-8h',
    },
    {
      ...hours('pg1', 'pg2', 11, 12, 13, { source: 'aabp2009', mark: 'read', when: { option: 'secondPg', is: 'h12' } }),
      id: 'pg-12h',
    },
    hours('deviceOut', 'service', 70, 72, 74, {
      source: 'gunn',
      mark: 'memory',
      note: '72 h is read; the 2 h either side are from memory.',
    }),
  ],
  factGaps: [calving50],
  timingAnchor: 'deviceOut',
  serviceStep: 'service',
  sources: [gunn, aabp2009, taskForce],
  notes: ['Intervals count from the first prostaglandin and device out, never from the second dose.'],
});

/** Prostaglandin and device first, GnRH a week later, out with prostaglandin after another. */
export const sevenAndSevenCows: ProtocolBody = protocol({
  name: '7 and 7, beef cows, 66 h',
  summary:
    'Prostaglandin and device, GnRH a week later with the device left in, device out with prostaglandin after another week, AI at 66 h. Four yardings.',
  family: 'gnrhDevice',
  classes: ['cow', 'firstCalver'],
  biology: 'taurus',
  visits: [yarding('in', 'Devices in'), yarding('mid', 'GnRH'), yarding('out', 'Devices out'), yarding('ai', 'AI')],
  steps: [
    deviceIn('in', { sourceLabel: 'D -14' }),
    pg('pg1', 'in', 25),
    gnrh('gnrh1', 'mid', 100, { sourceLabel: 'D -7' }),
    deviceOut('out', { sourceLabel: 'D 0' }),
    pg('pg2', 'out', 25),
    service('service', 'ai'),
    gnrh('gnrh2', 'ai', 100),
  ],
  gaps: [
    days('deviceIn', 'gnrh1', 7, { source: 'arkansas', mark: 'read' }),
    days('gnrh1', 'deviceOut', 7, { source: 'arkansas', mark: 'read' }),
    hours('deviceOut', 'service', 64, 66, 68, { source: 'arkansas', mark: 'read' }),
  ],
  factGaps: [calving50],
  timingAnchor: 'deviceOut',
  serviceStep: 'service',
  sources: [arkansas],
  notes: [
    'With sex-sorted semen a trial served 70 h after the second prostaglandin (Journal of Animal Science abstract; read).',
  ],
});

/** The suckler program tested on Irish farms. */
export const irishSuckler: ProtocolBody = protocol({
  ...sevenDayCows,
  name: '7-day device, suckler cows, 72 h',
  summary:
    'GnRH and device, seven days later device out with prostaglandin, eCG by choice, AI with GnRH 72 h after removal. Three yardings.',
  options: [
    {
      id: 'ecg',
      label: 'eCG at removal',
      values: [
        { id: 'without', label: 'without eCG' },
        { id: 'with', label: 'with eCG' },
      ],
      default: 'without',
    },
  ],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    gnrh('gnrh1', 'in'),
    deviceOut('out', { sourceLabel: 'Day 7' }),
    pg('pg', 'out'),
    ecg('ecg', 'out', undefined, { when: { option: 'ecg', is: 'with' } }),
    service('service', 'ai', { sourceLabel: 'Day 10' }),
    gnrh('gnrh2', 'ai'),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 7, { source: 'teagasc', mark: 'read' }),
    hours('deviceOut', 'service', 71, 72, 73, {
      source: 'teagasc',
      mark: 'read',
      note: '72 h is read; the hour either side is the vet’s.',
    }),
  ],
  factGaps: [{ ...calving50, leastDays: 35, source: 'Suckler synchronisation study (Teagasc)' }],
  sources: [
    teagasc,
    source('farmersjournal', 'Synchronisation: is it a viable option?', 'Irish Farmers Journal', 'read', {
      url: 'https://www.farmersjournal.ie/synchronisation-is-it-a-viable-option-377430',
    }),
  ],
  notes: ['Teagasc asks for at least 35 days since calving at device insertion; other sources for 50.'],
});

/** No device: GnRH, prostaglandin, GnRH with AI. */
export const coSynchCows: ProtocolBody = protocol({
  ...sevenDayCows,
  name: 'GnRH and prostaglandin, beef cows, 66 to 72 h',
  summary: 'GnRH, prostaglandin a week later, AI with GnRH at a fixed time; no device. Three yardings.',
  family: 'gnrh',
  visits: [yarding('gnrh', 'GnRH'), yarding('pg', 'Prostaglandin'), yarding('ai', 'AI')],
  steps: [
    gnrh('gnrh1', 'gnrh', 100, { sourceLabel: 'Day 0' }),
    pg('pg', 'pg', 25, { sourceLabel: 'Day 7' }),
    service('service', 'ai'),
    gnrh('gnrh2', 'ai', 100),
  ],
  gaps: [
    days('gnrh1', 'pg', 7, { source: 'theriogenology', mark: 'read' }),
    hours('pg', 'service', 66, 69, 72, { source: 'theriogenology', mark: 'read' }),
  ],
  factGaps: [{ ...calving50, to: 'gnrh1' }],
  timingAnchor: 'pg',
  sources: [
    source('theriogenology', 'Theriogenology paper on CO-Synch, secondary text', 'unknown author', 'read', {
      note: 'Earlier sheets give 48 h (from memory).',
    }),
  ],
  notes: [],
});
