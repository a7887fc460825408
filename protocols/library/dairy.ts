import type { ProtocolBody } from '../types';
import { days, deviceIn, deviceOut, gnrh, hours, pg, protocol, service, source, yarding } from './parts';
import { carvalho, croatian } from './sources';

const dcrc = source('dcrc', 'Synchronisation protocol sheets', 'Dairy Cattle Reproduction Council', 'memory');
const resynch = source(
  'resynch',
  'Resynchronisation of ovulation by ovarian structures at nonpregnancy diagnosis',
  'abstract, PubMed 29224858',
  'read',
);

const ovsynchSteps = [
  gnrh('gnrh1', 'g1', 100, { sourceLabel: 'Day 0' }),
  pg('pg', 'pg', 25, { sourceLabel: 'Day 7' }),
  gnrh('gnrh2', 'g2', 100),
  service('service', 'ai'),
];
const ovsynchVisits = [
  yarding('g1', 'First GnRH'),
  yarding('pg', 'Prostaglandin'),
  yarding('g2', 'Second GnRH'),
  yarding('ai', 'AI'),
];

/** GnRH, prostaglandin, GnRH at 56 h, service 16 h after that. */
export const ovsynch56: ProtocolBody = protocol({
  name: 'Ovsynch, dairy cows, 56 h and 16 h',
  summary: 'GnRH, prostaglandin a week later, GnRH 56 h after, AI 16 h after that. Four times through the race.',
  family: 'gnrh',
  classes: ['dairyCow'],
  biology: 'taurus',
  visits: ovsynchVisits,
  steps: ovsynchSteps,
  gaps: [
    days('gnrh1', 'pg', 7, { source: 'carvalho', mark: 'read' }),
    hours('pg', 'gnrh2', 55, 56, 57, {
      source: 'carvalho',
      mark: 'read',
      note: '56 h is read; the hour either side is the vet’s.',
    }),
    hours('gnrh2', 'service', 16, 16, 20, {
      source: 'carvalho',
      mark: 'read',
      note: 'Carvalho served at 16 h; other texts give 16 to 20 h.',
    }),
  ],
  timingAnchor: 'gnrh2',
  serviceStep: 'service',
  sources: [carvalho],
  notes: [
    'A second prostaglandin 24 h after the first gave 4.6 points more pregnancies (Borchardt et al. 2018, Journal of Dairy Science 101:8566; read).',
  ],
});

/** Two prostaglandins two weeks apart, then Ovsynch. */
export const presynchOvsynch: ProtocolBody = protocol({
  ...ovsynch56,
  name: 'Presynch-12 and Ovsynch, dairy cows',
  summary: 'Two doses of prostaglandin 14 days apart, Ovsynch 12 days later, AI 18 h after the last GnRH.',
  family: 'presynchronised',
  visits: [yarding('pre1', 'First presynch'), yarding('pre2', 'Second presynch'), ...ovsynchVisits],
  steps: [
    pg('pre1', 'pre1', 25, { sourceLabel: 'Day 0' }),
    pg('pre2', 'pre2', 25, { sourceLabel: 'Day 14' }),
    gnrh('gnrh1', 'g1', 100, { sourceLabel: 'Day 26' }),
    pg('pg', 'pg', 25, { sourceLabel: 'Day 33' }),
    gnrh('gnrh2', 'g2', 100, { sourceLabel: 'Day 35' }),
    service('service', 'ai'),
  ],
  gaps: [
    days('pre1', 'pre2', 14, { source: 'cvj', mark: 'read' }),
    days('pre2', 'gnrh1', 12, { source: 'cvj', mark: 'read' }),
    days('gnrh1', 'pg', 7, { source: 'cvj', mark: 'read' }),
    days('pg', 'gnrh2', 2, { source: 'cvj', mark: 'read' }),
    hours('gnrh2', 'service', 16, 18, 20, {
      source: 'cvj',
      mark: 'read',
      note: '18 h is read; the 2 h either side are the vet’s.',
    }),
  ],
  sources: [croatian],
  notes: ['Variants with 11 and 14 days before the first GnRH are published.'],
});

/** A short Ovsynch before the one that counts. */
export const doubleOvsynch: ProtocolBody = protocol({
  ...ovsynch56,
  name: 'Double Ovsynch, dairy cows',
  summary:
    'GnRH, prostaglandin and GnRH to presynchronise, then Ovsynch a week later; AI 16 to 18 h after the last GnRH.',
  family: 'presynchronised',
  visits: [
    yarding('pre1', 'Presynch GnRH'),
    yarding('pre2', 'Presynch prostaglandin'),
    yarding('pre3', 'Presynch second GnRH'),
    ...ovsynchVisits,
  ],
  steps: [
    gnrh('pre1', 'pre1', 100, { sourceLabel: 'Day 0' }),
    pg('pre2', 'pre2', 25, { sourceLabel: 'Day 7' }),
    gnrh('pre3', 'pre3', 100, { sourceLabel: 'Day 10' }),
    gnrh('gnrh1', 'g1', 100, { sourceLabel: 'Day 17' }),
    pg('pg', 'pg', 25, { sourceLabel: 'Day 24' }),
    gnrh('gnrh2', 'g2', 100, { sourceLabel: 'Day 26' }),
    service('service', 'ai'),
  ],
  gaps: [
    days('pre1', 'pre2', 7, { source: 'cvj', mark: 'read' }),
    days('pre2', 'pre3', 3, { source: 'cvj', mark: 'read' }),
    days('pre3', 'gnrh1', 7, { source: 'cvj', mark: 'read' }),
    days('gnrh1', 'pg', 7, { source: 'cvj', mark: 'read' }),
    hours('pg', 'gnrh2', 48, 56, 57, {
      source: 'carvalho',
      mark: 'read',
      note: 'The journal counts two days, Carvalho 56 h.',
    }),
    hours('gnrh2', 'service', 16, 16, 18, { source: 'carvalho', mark: 'read' }),
  ],
  sources: [croatian, carvalho],
  notes: [],
});

/** Prostaglandin and GnRH six days before Ovsynch. */
export const g6g: ProtocolBody = protocol({
  ...ovsynch56,
  name: 'G6G, dairy cows',
  summary: 'Prostaglandin, GnRH two days later, Ovsynch six days after that, AI 18 h after the last GnRH.',
  family: 'presynchronised',
  visits: [yarding('pre1', 'Presynch prostaglandin'), yarding('pre2', 'Presynch GnRH'), ...ovsynchVisits],
  steps: [
    pg('pre1', 'pre1', 25, { sourceLabel: 'Day 0' }),
    gnrh('pre2', 'pre2', 100, { sourceLabel: 'Day 2' }),
    gnrh('gnrh1', 'g1', 100, { sourceLabel: 'Day 8' }),
    pg('pg', 'pg', 25, { sourceLabel: 'Day 15' }),
    gnrh('gnrh2', 'g2', 100, { sourceLabel: 'Day 17' }),
    service('service', 'ai'),
  ],
  gaps: [
    days('pre1', 'pre2', 2, { source: 'cvj', mark: 'read' }),
    days('pre2', 'gnrh1', 6, { source: 'cvj', mark: 'read' }),
    days('gnrh1', 'pg', 7, { source: 'cvj', mark: 'read' }),
    days('pg', 'gnrh2', 2, { source: 'cvj', mark: 'read' }),
    hours('gnrh2', 'service', 16, 18, 20, {
      source: 'cvj',
      mark: 'read',
      note: '18 h is read; the 2 h either side are the vet’s.',
    }),
  ],
  sources: [croatian],
  notes: [],
});

/** For cows found empty at a scan about 32 days after AI. */
export const resynch32: ProtocolBody = protocol({
  ...ovsynch56,
  name: 'Resynch after an empty scan, dairy cows',
  summary:
    'From the scan about 32 days after AI: GnRH, prostaglandin a week later, GnRH at 56 h, AI 16 to 18 h after that.',
  gaps: [
    days('gnrh1', 'pg', 7, { source: 'resynch', mark: 'read' }),
    hours('pg', 'gnrh2', 55, 56, 57, {
      source: 'resynch',
      mark: 'read',
      note: '56 h is read; the hour either side is the vet’s.',
    }),
    hours('gnrh2', 'service', 16, 17, 18, { source: 'resynch', mark: 'read' }),
  ],
  factGaps: [
    {
      id: 'service',
      fact: 'lastService',
      to: 'gnrh1',
      leastDays: 29,
      mostDays: 35,
      source: 'Resynchronisation of ovulation (PubMed 29224858)',
      mark: 'read',
    },
  ],
  sources: [resynch],
  notes: [],
});

/** Five days with a device: dairy heifers, from memory. */
export const fiveDayDairyHeifers: ProtocolBody = protocol({
  name: '5-day device, dairy heifers, 72 h',
  summary:
    'GnRH and device, out with prostaglandin on day 5, a second dose a day later, AI with GnRH on day 8. Four times through the race.',
  family: 'gnrhDevice',
  classes: ['dairyHeifer'],
  biology: 'taurus',
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
    pg('pg2', 'pg2', 25, { sourceLabel: 'Day 6' }),
    service('service', 'ai', { sourceLabel: 'Day 8' }),
    gnrh('gnrh2', 'ai', 100),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 5, { source: 'dcrc', mark: 'memory' }),
    days('pg1', 'pg2', 1, { source: 'dcrc', mark: 'memory' }),
    hours('pg1', 'service', 70, 72, 74, { source: 'dcrc', mark: 'memory' }),
  ],
  timingAnchor: 'pg1',
  serviceStep: 'service',
  sources: [dcrc],
});

const spc = source(
  'spc',
  'Progesterone intravaginal device 1.38 g, summary of product characteristics',
  'NOAH Compendium (United Kingdom)',
  'read',
  {
    url: 'http://www.noahcompendium.co.uk/?id=-456629',
  },
);

/** The program of a United Kingdom label: prostaglandin the day before removal. */
export const ukDevice: ProtocolBody = protocol({
  name: '7-day device, prostaglandin the day before, 56 h',
  summary:
    'GnRH and device, prostaglandin 24 h before removal, AI 56 h after removal; or GnRH 36 h after removal and AI 16 to 20 h later.',
  family: 'gnrhDevice',
  classes: ['cow', 'dairyCow', 'firstCalver'],
  biology: 'taurus',
  options: [
    {
      id: 'timing',
      label: 'Service',
      values: [
        { id: 'fixed', label: 'AI 56 h after removal' },
        { id: 'gnrh', label: 'GnRH 36 h after removal, then AI' },
      ],
      default: 'fixed',
    },
  ],
  visits: [
    yarding('in', 'Devices in'),
    yarding('pg', 'Prostaglandin'),
    yarding('out', 'Devices out'),
    yarding('g2', 'GnRH'),
    yarding('ai', 'AI'),
  ],
  steps: [
    deviceIn('in'),
    gnrh('gnrh1', 'in'),
    pg('pg', 'pg'),
    deviceOut('out'),
    gnrh('gnrh2', 'g2', undefined, { when: { option: 'timing', is: 'gnrh' } }),
    service('service', 'ai'),
  ],
  gaps: [
    { ...days('deviceIn', 'deviceOut', 7, { source: 'spc', mark: 'read' }), most: 8 },
    days('pg', 'deviceOut', 1, { source: 'spc', mark: 'read' }),
    {
      ...hours('deviceOut', 'service', 54, 56, 58, {
        source: 'spc',
        mark: 'read',
        when: { option: 'timing', is: 'fixed' },
        note: '56 h is read; the 2 h either side are the vet’s.',
      }),
      id: 'out-ai',
    },
    hours('deviceOut', 'gnrh2', 35, 36, 37, {
      source: 'spc',
      mark: 'read',
      when: { option: 'timing', is: 'gnrh' },
      note: '36 h is read; the hour either side is the vet’s.',
    }),
    hours('gnrh2', 'service', 16, 18, 20, { source: 'spc', mark: 'read', when: { option: 'timing', is: 'gnrh' } }),
  ],
  factGaps: [
    {
      id: 'calving',
      fact: 'calving',
      to: 'deviceIn',
      leastDays: 20,
      source: '21 CFR 529.1940 (US Food and Drug Administration)',
      mark: 'read',
    },
  ],
  timingAnchor: 'deviceOut',
  serviceStep: 'service',
  sources: [spc],
});
