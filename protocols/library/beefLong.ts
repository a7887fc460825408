import type { ProtocolBody } from '../types';
import {
  days,
  deviceIn,
  deviceOut,
  gnrh,
  heatBy,
  hours,
  inHeat,
  notInHeat,
  paddock,
  patchOn,
  patchRead,
  pg,
  protocol,
  service,
  source,
  yarding,
} from './parts';
import { kstate, taskForce, thomas, westcentral } from './sources';

/** Device for fourteen days, prostaglandin sixteen days after it comes out: heifers. */
export const fourteenDayHeifers: ProtocolBody = protocol({
  name: '14-day device then prostaglandin, beef heifers, 66 h',
  summary:
    'Device for 14 days, prostaglandin 16 days after removal, AI with GnRH 66 h later. Four yardings over 33 days.',
  family: 'presynchronised',
  classes: ['heifer'],
  biology: 'taurus',
  visits: [
    yarding('in', 'Devices in'),
    yarding('out', 'Devices out'),
    yarding('pg', 'Prostaglandin'),
    yarding('ai', 'AI'),
  ],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    deviceOut('out', { sourceLabel: 'Day 14' }),
    pg('pg', 'pg', 25, { sourceLabel: 'Day 30' }),
    patchOn('pg'),
    service('service', 'ai'),
    gnrh('gnrh', 'ai', 100),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 14, { source: 'thomas', mark: 'read' }),
    days('deviceOut', 'pg', 16, { source: 'thomas', mark: 'read' }),
    hours('pg', 'service', 64, 66, 68, {
      source: 'thomas',
      mark: 'memory',
      note: '66 h is read; the 2 h either side are from memory.',
    }),
  ],
  timingAnchor: 'pg',
  serviceStep: 'service',
  sources: [thomas, taskForce],
  notes: [
    'The heat straight after the device is not used.',
    'A head-to-head trial served at 72 h (Kasimanickam et al. 2015, Theriogenology 83:1226; read).',
  ],
});

/** Those in heat by 66 h are served then without GnRH, the rest a day later. */
export const fourteenDaySplit: ProtocolBody = protocol({
  ...fourteenDayHeifers,
  name: '14-day device then prostaglandin, beef heifers, split time',
  summary:
    'As the 14-day program; heifers in heat by 66 h are served then without GnRH, all others at 90 h. Nobody gets two straws.',
  observations: [heatBy('heat66', 'In heat by 66 h')],
  visits: [
    yarding('in', 'Devices in'),
    yarding('out', 'Devices out'),
    yarding('pg', 'Prostaglandin'),
    yarding('ai1', 'First AI'),
    yarding('ai2', 'Second AI'),
  ],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    deviceOut('out', { sourceLabel: 'Day 14' }),
    pg('pg', 'pg', 25, { sourceLabel: 'Day 30' }),
    patchOn('pg'),
    patchRead('ai1', 'heat66'),
    service('service1', 'ai1', { when: inHeat('heat66') }),
    service('service2', 'ai2', { when: notInHeat('heat66') }),
    gnrh('gnrh', 'ai2', 100, { when: notInHeat('heat66') }),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 14, { source: 'thomas', mark: 'read' }),
    days('deviceOut', 'pg', 16, { source: 'thomas', mark: 'read' }),
    hours('pg', 'patchRead', 64, 66, 68, {
      source: 'thomas',
      mark: 'memory',
      note: '66 h is read; the 2 h either side are from memory.',
    }),
    hours('pg', 'service2', 88, 90, 92, {
      source: 'thomas',
      mark: 'memory',
      note: '90 h is read; the 2 h either side are from memory.',
    }),
  ],
  serviceStep: 'service1',
  sources: [thomas],
  notes: ['GnRH at 90 h was optional in the trial.'],
});

/** Split time after seven days with a device: cows. */
export const splitTimeCows: ProtocolBody = protocol({
  name: '7-day device, beef cows, split time 65 and 84 h',
  summary:
    'As the 7-day program; cows in heat by 65 h are served then, the others get GnRH then and are served at 84 h.',
  family: 'gnrhDevice',
  classes: ['cow', 'firstCalver'],
  biology: 'taurus',
  observations: [heatBy('heat65', 'In heat by 65 h')],
  visits: [
    yarding('in', 'Devices in'),
    yarding('out', 'Devices out'),
    yarding('ai1', 'First AI'),
    yarding('ai2', 'Second AI'),
  ],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    gnrh('gnrh1', 'in', 100),
    deviceOut('out', { sourceLabel: 'Day 7' }),
    pg('pg', 'out', 25),
    patchOn('out'),
    patchRead('ai1', 'heat65'),
    service('service1', 'ai1', { when: inHeat('heat65') }),
    gnrh('gnrh2', 'ai1', 100, { when: notInHeat('heat65') }),
    service('service2', 'ai2', { when: notInHeat('heat65') }),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 7, { source: 'kstate', mark: 'read' }),
    hours('deviceOut', 'patchRead', 64, 65, 66, {
      source: 'kstate',
      mark: 'read',
      note: '65 h is read; the hour either side is the vet’s.',
    }),
    hours('deviceOut', 'service2', 83, 84, 85, {
      source: 'kstate',
      mark: 'read',
      note: '84 h is read; the hour either side is the vet’s.',
    }),
  ],
  timingAnchor: 'deviceOut',
  serviceStep: 'service1',
  sources: [kstate],
  notes: ['Other splits were tested: 60 and 75 h, 55 and 75 h. GnRH helps only cows not yet in heat (read).'],
});

/** Progestagen in the feed for fourteen days, prostaglandin nineteen days after the last feeding. */
export const progestagenFeedHeifers: ProtocolBody = protocol({
  name: 'Progestagen feed then prostaglandin, beef heifers, 72 h',
  summary:
    'Melengestrol acetate in the feed for 14 days, prostaglandin 19 days after the last feeding, AI with GnRH 72 h later. Two yardings over 36 days.',
  family: 'progestagenFeed',
  classes: ['heifer'],
  biology: 'taurus',
  visits: [paddock('feed', 'Feed'), yarding('pg', 'Prostaglandin'), yarding('ai', 'AI')],
  steps: [
    {
      id: 'feed',
      kind: 'progestagenFeed',
      level: 'group',
      visit: 'feed',
      items: [{ active: 'melengestrolAcetate', amount: 0.5, unit: 'mg', per: 'head', route: 'oral' }],
      repeat: { every: { days: 1 }, count: 14 },
      sourceLabel: 'Day 1 to 14',
    },
    pg('pg', 'pg', 25, { sourceLabel: 'Day 33' }),
    service('service', 'ai'),
    gnrh('gnrh', 'ai', 100),
  ],
  gaps: [
    {
      ...days(
        'feed',
        'pg',
        32,
        {
          source: 'unl27',
          mark: 'derived',
          note: '14 feedings are 13 days from first to last; 19 more make 32. The sheets call the first feeding Day 1, and so this Day 33.',
        },
        120,
      ),
    },
    hours('pg', 'service', 70, 72, 74, { source: 'brtf', mark: 'memory' }),
  ],
  timingAnchor: 'pg',
  serviceStep: 'service',
  sources: [
    westcentral,
    source('mfa', 'Estrus synchronization program for heifers (feed bulletin)', 'MFA Incorporated', 'read', {
      note: 'Count back 34 days from the start of breeding to the first feeding.',
    }),
    taskForce,
  ],
  notes: [
    'The heat straight after feeding is of low fertility and not used (University of Illinois Extension; read).',
    'Not for adult cows (University of Missouri Extension; read).',
  ],
});

/** Two prostaglandins, and two services of every animal: a true double service. */
export const twoProstaglandins: ProtocolBody = protocol({
  name: 'Two prostaglandins, heifers, AI at 72 and 96 h',
  summary: 'Two doses of prostaglandin 11 days apart, every heifer served at 72 and again at 96 h. Four yardings.',
  family: 'prostaglandin',
  classes: ['heifer', 'dairyHeifer'],
  biology: 'taurus',
  visits: [
    yarding('pg1', 'First prostaglandin'),
    yarding('pg2', 'Second prostaglandin'),
    yarding('ai1', 'First AI'),
    yarding('ai2', 'Second AI'),
  ],
  steps: [
    { ...pg('pg1', 'pg1'), items: [{ active: 'cloprostenol', amount: 500, unit: 'ug', per: 'head', route: 'im' }] },
    { ...pg('pg2', 'pg2'), items: [{ active: 'cloprostenol', amount: 500, unit: 'ug', per: 'head', route: 'im' }] },
    service('service1', 'ai1'),
    service('service2', 'ai2'),
  ],
  gaps: [
    {
      ...days('pg1', 'pg2', 11, { source: 'maiden', mark: 'read' }),
      most: 14,
      note: '11 to 14 days are used; 14 gave better conception than 11 (Murugavel et al.; read).',
    },
    hours('pg2', 'service1', 71, 72, 73, {
      source: 'maiden',
      mark: 'read',
      note: '72 h is read; the hour either side is the vet’s.',
    }),
    hours('pg2', 'service2', 95, 96, 97, {
      source: 'maiden',
      mark: 'read',
      note: '96 h is read; the hour either side is the vet’s.',
    }),
  ],
  timingAnchor: 'pg2',
  serviceStep: 'service1',
  sources: [
    source(
      'maiden',
      'Two cloprostenol injections 11 days apart, AI at 72 and 96 h, maiden heifers',
      'abstract, scilit.com',
      'read',
      {
        url: 'https://scilit.com/publications/a608769d03ed923a33cddf5c40093038',
        note: '39 % pregnant.',
      },
    ),
  ],
  notes: ['Prostaglandin works on days 5 to 17 of the cycle only.'],
});
