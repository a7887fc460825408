/**
 * The protocol as data, and what the core says about it. Pure types: no clock, zone, locale or chance in here.
 * Durations are minutes unless a name says otherwise; instants are milliseconds since 1970-01-01T00:00Z.
 */

/** Milliseconds since the Unix epoch, UTC. */
export type Instant = number;
/** IANA zone id, such as `Australia/Sydney`. */
export type Zone = string;
/** Wall-clock date and time in some zone, `YYYY-MM-DDTHH:MM`. */
export type LocalDateTime = string;
/** Calendar date, `YYYY-MM-DD`. */
export type LocalDate = string;
/** Wall-clock time of day, `HH:MM`. */
export type ClockTime = string;

export const stepKinds = [
  'deviceIn',
  'deviceOut',
  'deviceCheck',
  'prostaglandin',
  'gnrh',
  'hcg',
  'oestradiolBenzoate',
  'oestradiolCypionate',
  'oestradiolValerate',
  'ecg',
  'progesterone',
  'fsh',
  'progestagenFeed',
  'heatAidOn',
  'heatAidRead',
  'heatRound',
  'fixedTimeService',
  'serviceOnHeat',
  'embryoTransfer',
  'ovarianScan',
  'tractScore',
  'weigh',
  'vaccination',
  'calvesOff',
  'calvesBack',
  'bullIn',
  'bullOut',
  'bullTest',
  'pregnancyTest',
  'draftOff',
  'move',
  'other',
] as const;
export type StepKind = (typeof stepKinds)[number];

export const animalClasses = ['heifer', 'firstCalver', 'cow', 'dairyHeifer', 'dairyCow'] as const;
export type AnimalClass = (typeof animalClasses)[number];

export const actives = [
  'progesterone',
  'dinoprost',
  'cloprostenol',
  'gonadorelin',
  'buserelin',
  'hcg',
  'oestradiolBenzoate',
  'oestradiolCypionate',
  'oestradiolValerate',
  'ecg',
  'fsh',
  'melengestrolAcetate',
  'vaccine',
  'heatAid',
] as const;
export type Active = (typeof actives)[number];

export const doseUnits = ['mg', 'ug', 'g', 'iu', 'device', 'patch', 'dose'] as const;
export type DoseUnit = (typeof doseUnits)[number];
export const routes = ['im', 'sc', 'intravaginal', 'oral', 'topical'] as const;
export type AdministrationRoute = (typeof routes)[number];

/** Whether a figure was read in its source or recalled. Recalled figures are shown as 'from memory'. */
export type Mark = 'read' | 'memory' | 'derived';

export interface Source {
  id: string;
  title: string;
  /** Author or publisher. */
  publisher: string;
  year?: number;
  url?: string;
  mark: Mark;
  /** What the source itself says, or where it contradicts another, in our words. */
  note?: string;
}

/** What is given in a step. The amount is the source's; the vet confirms it. */
export interface Item {
  active: Active;
  /** Absent: the source names no amount; the vet must fill it in before sign-off. */
  amount?: number;
  unit: DoseUnit;
  per: 'head' | 'kg';
  /** Amount for a class, where it differs from `amount`. */
  byClass?: Partial<Record<AnimalClass, number>>;
  route: AdministrationRoute;
  site?: string;
  /** Days of meat and milk withholding; absent: the label decides and the vet writes it in the authority. */
  withholding?: { meatDays?: number; milkHours?: number };
}

/** A condition over options (fixed at the start), the animal's attributes and what was seen in it. */
export type Condition =
  | { all: Condition[] }
  | { any: Condition[] }
  | { not: Condition }
  | { option: string; is: string }
  | { observed: string; is: string }
  | { class: AnimalClass[] };

export interface Repeat {
  /** Local days (or minutes) between two occurrences. */
  every: { days?: number; minutes?: number };
  /** Number of occurrences, the first included. */
  count: number;
  /** Amount for each occurrence (FSH), where it differs. */
  amounts?: number[];
}

export interface Step {
  id: string;
  kind: StepKind;
  /** Plain label shown beside the mark; absent: the word of the kind. */
  label?: string;
  /** `group` steps (bull in, feeding, heat round, calves off) keep no record per animal. */
  level: 'animal' | 'group';
  visit: string;
  when?: Condition;
  items: Item[];
  repeat?: Repeat;
  /** Id of the observation that this step makes. */
  observe?: string;
  /** Who may do it, where law or skill asks. */
  credential?: 'vet' | 'technician';
  /** The source's own day label, such as "Day 33" or "D-10". */
  sourceLabel?: string;
  note?: string;
}

/** Steps done to an animal at the same moment. One visit of one group is one yarding (or one paddock act). */
export interface Visit {
  id: string;
  label: string;
  /** False: no muster (feeding, heat round, calves back). */
  yarded: boolean;
}

export type GapUnit = 'elapsedHours' | 'localDays' | 'milkings';

/**
 * A bound on the time from one step to another: `least <= t(to) - t(from) <= most`.
 * elapsedHours: hours, whatever clocks do. localDays: whole local days, then at `clock` (absent: the clock time of
 * `from`), give or take `toleranceMinutes`. milkings: counted in the herd's milking times.
 */
export interface Gap {
  id: string;
  from: string;
  to: string;
  unit: GapUnit;
  least?: number;
  ideal?: number;
  most?: number;
  clock?: ClockTime;
  /** localDays only: give or take around the clock time, the vet's own figure where `toleranceMark` is absent. */
  toleranceMinutes?: number;
  toleranceMark?: Mark;
  when?: Condition;
  source?: string;
  mark?: Mark;
  note?: string;
}

/** Least days from a fact of the animal to a named step, such as 50 days from calving to device in. */
export interface FactGap {
  id: string;
  fact: 'calving' | 'birth' | 'lastService';
  to: string;
  leastDays?: number;
  mostDays?: number;
  source?: string;
  mark?: Mark;
  note?: string;
}

/** After an outside event (heat first seen) an act is due: it opens a deadline and is not scheduled. */
export interface Deadline {
  id: string;
  event: 'heatSeen' | 'deviceLost' | 'calved' | 'testedOpen';
  step: string;
  leastHours?: number;
  idealHours?: number;
  mostHours?: number;
  source?: string;
  mark?: Mark;
}

export interface Option {
  id: string;
  label: string;
  values: { id: string; label: string }[];
  default: string;
}

/** At most three observations in a protocol, so at most eight scenarios when each has two results. */
export interface Observation {
  id: string;
  label: string;
  results: { id: string; label: string }[];
  /** What an animal that was not seen, or lost its patch, counts as. */
  onUnknown: string | 'askVet';
}

export interface ProtocolBody {
  schema: 1;
  name: string;
  /** One or two sentences: for whom and how. */
  summary: string;
  family:
    'gnrhDevice' | 'gnrh' | 'oestradiol' | 'prostaglandin' | 'progestagenFeed' | 'presynchronised' | 'naturalService';
  /** Which animals it suits. */
  classes: AnimalClass[];
  biology: 'taurus' | 'indicus' | 'any';
  options: Option[];
  observations: Observation[];
  visits: Visit[];
  steps: Step[];
  gaps: Gap[];
  factGaps: FactGap[];
  deadlines: Deadline[];
  /** Step that the service interval is counted from. */
  timingAnchor: string;
  /** The step planned for when planning backwards: usually the (first) fixed-time service. */
  serviceStep: string;
  exits: ('servedEarly' | 'pregnant' | 'withdrawn')[];
  next?: { outcome: 'open' | 'pregnant'; library?: string; note: string }[];
  /** What the vet wrote for a late or missed step, by step id: shown to the crew when it happens. */
  lateChoices?: Record<string, string>;
  sources: Source[];
  notes: string[];
}

export type Severity = 'stop' | 'warn' | 'note';

/** A finding of the core: the words are made of `code` and `params` by the message catalogue. */
export interface Finding {
  code: FindingCode;
  severity: Severity;
  steps: string[];
  visits?: string[];
  /** Figures and names for the sentence. Instants are `Instant`; keys ending in `At` are instants, in `Minutes` minutes. */
  params: Record<string, string | number | string[]>;
  /** Path into the protocol body for a field error, such as `gaps.2.most`. */
  path?: string;
  /** Where the rule comes from, in words, or `common practice, no source`. */
  source?: string;
}

export const findingCodes = [
  // protocol
  'nameMissing',
  'unknownStep',
  'unknownVisit',
  'unknownOption',
  'unknownObservation',
  'duplicateId',
  'emptyVisit',
  'gapEmpty',
  'gapReversed',
  'gapBounds',
  'badClock',
  'contradiction',
  'unreachable',
  'noService',
  'anchorMissing',
  'amountMissing',
  'tooManyObservations',
  'observationUnused',
  'toleranceNotInSource',
  'fromMemory',
  'serviceAfterTooWide',
  'oestradiolLaw',
  'progestagenFeedAdultCows',
  // plan
  'clockChange',
  'clockTimeSkipped',
  'clockTimeTwice',
  'weekend',
  'holiday',
  'outsideYardHours',
  'inThePast',
  'clash',
  'notKnownEmpty',
  'daysSinceCalving',
  'calvingUnknown',
  'tooYoung',
  'wrongClass',
  'inAnotherCohort',
  'authorityMissing',
  'authorityShort',
  'authorityExpired',
  'authorityWrongClass',
  'authorityWrongActive',
  'windowMissed',
  'windowTight',
  'headCountOnly',
  'protocolRetired',
  'outsideRegion',
] as const;
export type FindingCode = (typeof findingCodes)[number];

export interface Window {
  earliest: Instant;
  latest: Instant;
}

/** What `expand` says of one visit. */
export interface PlannedVisit {
  visit: string;
  /** Planned moment: first animal treated. */
  at: Instant;
  /** When it may happen for one animal, given all gaps and all that is fixed. */
  window: Window;
  /** Steps of this visit that apply in at least one branch, in the protocol's order. */
  steps: string[];
  /** Occurrence number for repeated steps, from 1; 1 for all others. */
  occurrence: number;
  /** Elapsed minutes since the timing anchor, negative before it. */
  sinceAnchorMinutes: number;
  /** Elapsed minutes since the first visit. */
  sinceStartMinutes: number;
}

export interface Plan {
  visits: PlannedVisit[];
  findings: Finding[];
}
