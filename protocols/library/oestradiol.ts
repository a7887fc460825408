import type { ProtocolBody } from '../types';
import {
  benzoate,
  cloprostenol,
  cypionate,
  days,
  deviceIn,
  deviceOut,
  ecg,
  gnrh,
  heatBy,
  hours,
  notInHeat,
  oestradiolNote,
  patchRead,
  pg,
  protocol,
  service,
  source,
  yarding,
} from './parts';

const meneghetti = source(
  'meneghetti',
  'Fixed-time AI of Nelore cows, device, oestradiol and calf removal',
  'Meneghetti et al., Theriogenology 72:179-189',
  'read',
  { year: 2009 },
);
const sales = source(
  'sales',
  'Oestradiol benzoate 24 h after removal or cypionate at removal',
  'Sales et al., Theriogenology 78:510-516',
  'read',
  { year: 2012, note: 'LH surge 19.6 h after benzoate, 50.5 h after cypionate.' },
);
const rbz = source(
  'rbz',
  'Nelore cows, 8-day device with and without eCG',
  'Revista Brasileira de Zootecnia (SciELO)',
  'read',
  { year: 2014 },
);
const braford = source('braford', 'J-Synch and conventional protocol in Braford heifers', 'DOAJ article', 'read', {
  url: 'https://doaj.org/article/77cc12a6b2574058b49de8c59928c283',
  note: '44.3 % against 42.5 % pregnant.',
});

/** Nine days with a device, calves off for the last two: Nelore cows. */
export const nelore9: ProtocolBody = protocol({
  name: '9-day device with oestradiol, Bos indicus cows, 48 h',
  summary:
    'Device and benzoate, prostaglandin two days before removal, cypionate at removal with calves off, AI 48 h later. Four yardings.',
  family: 'oestradiol',
  classes: ['cow', 'firstCalver'],
  biology: 'indicus',
  visits: [
    yarding('in', 'Devices in'),
    yarding('pg', 'Prostaglandin'),
    yarding('out', 'Devices out'),
    yarding('ai', 'AI'),
  ],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    benzoate('ob', 'in', 2),
    pg('pg', 'pg', 12.5, { sourceLabel: 'Day 7' }),
    deviceOut('out', { sourceLabel: 'Day 9' }),
    cypionate('oc', 'out', 0.5),
    { id: 'calvesOff', kind: 'calvesOff', level: 'group', visit: 'out', items: [] },
    service('service', 'ai', { sourceLabel: 'Day 11' }),
    { id: 'calvesBack', kind: 'calvesBack', level: 'group', visit: 'ai', items: [] },
  ],
  gaps: [
    days('deviceIn', 'pg', 7, { source: 'meneghetti', mark: 'read' }),
    days('pg', 'deviceOut', 2, { source: 'meneghetti', mark: 'read' }),
    hours('deviceOut', 'service', 46, 48, 50, {
      source: 'meneghetti',
      mark: 'read',
      note: '48 h is read; the 2 h either side are the vet’s.',
    }),
  ],
  timingAnchor: 'deviceOut',
  serviceStep: 'service',
  sources: [meneghetti],
  notes: [
    'For anoestrous mobs the source gives prostaglandin at removal instead.',
    'The trial reused devices; labels say single use.',
    oestradiolNote,
  ],
});

const inducer = {
  id: 'inducer',
  label: 'Ovulation inducer',
  values: [
    { id: 'oc', label: 'cypionate at removal' },
    { id: 'ob', label: 'benzoate 24 h after removal' },
  ],
  default: 'oc',
};

/** Eight days, with the choice of ester: it decides the number of yardings. */
export const indicus8: ProtocolBody = protocol({
  name: '8-day device with oestradiol, Bos indicus cows, 48 to 54 h',
  summary:
    'Device and benzoate, out with prostaglandin after eight days, cypionate at removal or benzoate a day later, AI 48 to 54 h after removal.',
  family: 'oestradiol',
  classes: ['cow', 'firstCalver', 'heifer'],
  biology: 'indicus',
  options: [
    inducer,
    {
      id: 'ecg',
      label: 'eCG at removal',
      values: [
        { id: 'with', label: 'with eCG' },
        { id: 'without', label: 'without eCG' },
      ],
      default: 'with',
    },
  ],
  visits: [
    yarding('in', 'Devices in'),
    yarding('out', 'Devices out'),
    yarding('induce', 'Benzoate'),
    yarding('ai', 'AI'),
  ],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    benzoate('ob1', 'in', 2),
    deviceOut('out', { sourceLabel: 'Day 8' }),
    cloprostenol('pg', 'out', 250),
    ecg('ecg', 'out', 300, { when: { option: 'ecg', is: 'with' } }),
    cypionate('oc', 'out', 0.5, { when: { option: 'inducer', is: 'oc' } }),
    benzoate('ob2', 'induce', 1, { when: { option: 'inducer', is: 'ob' } }),
    service('service', 'ai', { sourceLabel: 'Day 10' }),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 8, { source: 'rbz', mark: 'read' }),
    { ...days('deviceOut', 'ob2', 1, { source: 'sales', mark: 'read' }), when: { option: 'inducer', is: 'ob' } },
    hours('deviceOut', 'service', 48, 51, 54, { source: 'rbz', mark: 'read' }),
  ],
  timingAnchor: 'deviceOut',
  serviceStep: 'service',
  sources: [rbz, sales],
  notes: [oestradiolNote],
});

/** Six days, no oestradiol at removal; those not in heat get GnRH at AI. */
export const jSynchHeifers: ProtocolBody = protocol({
  name: '6-day device with oestradiol, heifers, 72 h',
  summary:
    'Device and benzoate, out with prostaglandin after six days, AI of those in heat at 60 h, the rest at 72 h with GnRH.',
  family: 'oestradiol',
  classes: ['heifer'],
  biology: 'any',
  observations: [heatBy('heat60', 'In heat by 60 h')],
  visits: [
    yarding('in', 'Devices in'),
    yarding('out', 'Devices out'),
    yarding('ai1', 'First AI'),
    yarding('ai2', 'Second AI'),
  ],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    benzoate('ob', 'in', 2),
    deviceOut('out', { sourceLabel: 'Day 6' }),
    cloprostenol('pg', 'out'),
    { id: 'paint', kind: 'heatAidOn', level: 'animal', visit: 'out', items: [] },
    patchRead('ai1', 'heat60'),
    service('service1', 'ai1', { when: { observed: 'heat60', is: 'yes' } }),
    service('service2', 'ai2', { when: notInHeat('heat60') }),
    gnrh('gnrh', 'ai2', 100, { when: notInHeat('heat60') }),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 6, { source: 'braford', mark: 'read' }),
    hours('deviceOut', 'patchRead', 59, 60, 61, {
      source: 'braford',
      mark: 'read',
      note: '60 h is read; the hour either side is the vet’s.',
    }),
    hours('deviceOut', 'service2', 70, 72, 74, {
      source: 'braford',
      mark: 'read',
      note: '72 h is read; the 2 h either side are the vet’s.',
    }),
  ],
  timingAnchor: 'deviceOut',
  serviceStep: 'service1',
  sources: [braford],
  notes: ['In the trial tail paint rubbed by 40 % or more counted as in heat.', oestradiolNote],
});

/** The program of northern Australian practice, from memory. */
export const australian8: ProtocolBody = protocol({
  name: '8-day device with benzoate, Australian beef, 52 to 56 h',
  summary:
    'Device and benzoate, out with prostaglandin after eight days, benzoate a day later, AI 52 to 56 h after removal. Four yardings. All from memory.',
  family: 'oestradiol',
  classes: ['heifer', 'cow', 'firstCalver'],
  biology: 'any',
  visits: [yarding('in', 'Devices in'), yarding('out', 'Devices out'), yarding('ob', 'Benzoate'), yarding('ai', 'AI')],
  steps: [
    deviceIn('in', { sourceLabel: 'Day 0' }),
    benzoate('ob1', 'in'),
    deviceOut('out', { sourceLabel: 'Day 8' }),
    cloprostenol('pg', 'out'),
    ecg('ecg', 'out'),
    benzoate('ob2', 'ob', undefined, { sourceLabel: 'Day 9' }),
    service('service', 'ai', { sourceLabel: 'Day 10' }),
  ],
  gaps: [
    days('deviceIn', 'deviceOut', 8, { source: 'practice', mark: 'memory' }),
    days('deviceOut', 'ob2', 1, { source: 'practice', mark: 'memory' }),
    hours('deviceOut', 'service', 52, 54, 56, { source: 'practice', mark: 'memory' }),
  ],
  timingAnchor: 'deviceOut',
  serviceStep: 'service',
  sources: [source('practice', 'Practice in Queensland and New South Wales', 'no readable sheet', 'memory')],
  notes: [oestradiolNote],
});
