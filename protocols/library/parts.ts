import type { Active, Condition, Gap, Item, Mark, ProtocolBody, Source, Step, Visit } from '../types';

/** Small makers for the bodies of the library: the result is plain data. */

const given = (active: Active, amount: number | undefined, unit: Item['unit'], route: Item['route']): Item => ({
  active,
  ...(amount === undefined ? {} : { amount }),
  unit,
  per: 'head',
  route,
});

type More = Partial<Omit<Step, 'id' | 'kind' | 'visit' | 'items'>>;

const step = (id: string, kind: Step['kind'], visit: string, items: Item[], more: More = {}): Step => ({
  id,
  kind,
  visit,
  level: 'animal',
  items,
  ...more,
});

export const deviceIn = (visit: string, more?: More): Step =>
  step('deviceIn', 'deviceIn', visit, [given('progesterone', 1, 'device', 'intravaginal')], more);
export const deviceOut = (visit: string, more?: More): Step => step('deviceOut', 'deviceOut', visit, [], more);

/** GnRH; without an amount the vet writes it from the label. */
export const gnrh = (id: string, visit: string, amount?: number, more?: More): Step =>
  step(id, 'gnrh', visit, [given('gonadorelin', amount, 'ug', 'im')], more);

/** Prostaglandin as dinoprost; 25 mg where the source says so. */
export const pg = (id: string, visit: string, amount?: number, more?: More): Step =>
  step(id, 'prostaglandin', visit, [given('dinoprost', amount, 'mg', 'im')], more);
export const cloprostenol = (id: string, visit: string, ug?: number, more?: More): Step =>
  step(id, 'prostaglandin', visit, [given('cloprostenol', ug, 'ug', 'im')], more);
export const benzoate = (id: string, visit: string, mg?: number, more?: More): Step =>
  step(id, 'oestradiolBenzoate', visit, [given('oestradiolBenzoate', mg, 'mg', 'im')], more);
export const cypionate = (id: string, visit: string, mg?: number, more?: More): Step =>
  step(id, 'oestradiolCypionate', visit, [given('oestradiolCypionate', mg, 'mg', 'im')], more);
export const ecg = (id: string, visit: string, iu?: number, more?: More): Step =>
  step(id, 'ecg', visit, [given('ecg', iu, 'iu', 'im')], more);

export const patchOn = (visit: string): Step =>
  step('patchOn', 'heatAidOn', visit, [given('heatAid', 1, 'patch', 'topical')]);
export const patchRead = (visit: string, observe: string): Step =>
  step('patchRead', 'heatAidRead', visit, [], { observe });
export const service = (id: string, visit: string, more?: More): Step =>
  step(id, 'fixedTimeService', visit, [], { credential: 'technician', ...more });

export const yarding = (id: string, label: string): Visit => ({ id, label, yarded: true });
export const paddock = (id: string, label: string): Visit => ({ id, label, yarded: false });

interface Cited {
  source: string;
  mark: Mark;
  when?: Condition;
  note?: string;
}

/** Elapsed hours; a single figure in the source is its ideal, and the bounds are what the source gives. */
export const hours = (from: string, to: string, least: number, ideal: number, most: number, cited: Cited): Gap => ({
  id: `${from}-${to}`,
  from,
  to,
  unit: 'elapsedHours',
  least,
  ideal,
  most,
  ...cited,
});

/**
 * Local days at the same clock hour. The sources count days and name no hours: the tolerance is a proposal for the
 * vet to make their own, and is said to be in no source.
 */
export const days = (from: string, to: string, n: number, cited: Cited, toleranceMinutes = 60): Gap => ({
  id: `${from}-${to}`,
  from,
  to,
  unit: 'localDays',
  least: n,
  ideal: n,
  most: n,
  toleranceMinutes,
  ...cited,
});

type Defaulted = 'schema' | 'options' | 'observations' | 'factGaps' | 'deadlines' | 'exits' | 'notes';
type Given = Omit<ProtocolBody, Defaulted> & Partial<Pick<ProtocolBody, Defaulted>>;

const always = ['Doses are those of the source or left open: the vet confirms each with the label and local law.'];

export const protocol = (body: Given): ProtocolBody => ({
  schema: 1,
  options: [],
  observations: [],
  factGaps: [],
  deadlines: [],
  exits: ['withdrawn'],
  ...body,
  notes: [...(body.notes ?? []), ...always],
});

/** In heat or not by a moment: the observation of split-time programs. */
export const heatBy = (id: string, label: string): ProtocolBody['observations'][number] => ({
  id,
  label,
  results: [
    { id: 'yes', label: 'in heat' },
    { id: 'no', label: 'not in heat' },
  ],
  onUnknown: 'no',
});
export const inHeat = (id: string): Condition => ({ observed: id, is: 'yes' });
export const notInHeat = (id: string): Condition => ({ observed: id, is: 'no' });

export const source = (
  id: string,
  title: string,
  publisher: string,
  mark: Mark,
  more: Partial<Source> = {},
): Source => ({
  id,
  title,
  publisher,
  mark,
  ...more,
});

/** Legal status of oestradiol, said in every protocol that gives it. */
export const oestradiolNote =
  'Oestradiol: forbidden in food animals in the European Union (Directive 96/22/EC as amended by 2008/97/EC), not lawful for this use in the United States (AABP guideline 2019), withdrawn in New Zealand (2007), used in Australian beef but not dairy cattle. The label, local law and the market decide.';
