import type { FindingCode } from '../types';

/**
 * What the `params` of each finding hold, for the message catalogue. Keys ending in `At` are instants, in `Minutes`
 * minutes, in `Days` days; `step`, `from`, `to` are step ids (of fact gaps and deadlines `from` is the fact or
 * event), `visit`, `gap`, `gaps`, `option`, `observation` ids of those. A key with `?` may be absent. Figures of
 * `gapBounds` are an empty string where the gap has none.
 */
const ofGap = ['gap', 'from', 'to'] as const;
const ofAnimals = ['count', 'tags'] as const;
const ofDays = ['fact', 'step', 'leastDays?', 'mostDays?', ...ofAnimals] as const;
const ofVisit = ['visit', 'dueAt'] as const;
const ofNeed = ['active', 'class', 'head', 'covered', 'short', 'amount?', 'unit?', 'firstAt?', 'lastAt?'] as const;

export const findingParams: Readonly<Record<FindingCode, readonly string[]>> = {
  nameMissing: [],
  unknownStep: ['step'],
  unknownVisit: ['visit'],
  unknownOption: ['option', 'value'],
  unknownObservation: ['observation', 'value?'],
  duplicateId: ['id'],
  emptyVisit: ['visit'],
  gapEmpty: ofGap,
  gapReversed: [...ofGap, 'elapsedMinutes?'],
  gapBounds: [...ofGap, 'least', 'ideal', 'most'],
  badClock: ['gap', 'clock'],
  // options, observed: ids of the values that all contradicting scenarios share; across: 'branches' where each branch
  // holds by itself and one visit would have to be at the times of all
  contradiction: ['gaps', 'options', 'observed', 'across?'],
  unreachable: ['visit'],
  noService: ['step'],
  anchorMissing: ['step'],
  amountMissing: ['step', 'active'],
  // options (how many there are) only where the choices of options are too many, with path `options`
  tooManyObservations: ['observations', 'scenarios', 'options?'],
  observationUnused: ['observation'],
  toleranceNotInSource: [...ofGap, 'toleranceMinutes'],
  fromMemory: ['count', 'gaps'],
  serviceAfterTooWide: [],
  oestradiolLaw: [],
  progestagenFeedAdultCows: ['classes'],
  // unit of the gap; clock: what the clock shows then; unchangedClock: what it would show without the change
  clockChange: [
    'from',
    'to',
    'changeAt',
    'shiftMinutes',
    'unit',
    'elapsedMinutes',
    'nominalMinutes',
    'clock',
    'unchangedClock',
  ],
  // local: the clock time asked for; dueAt: where the jump moved it
  clockTimeSkipped: [...ofVisit, 'local'],
  // reading: 'first' or 'second' of the two
  clockTimeTwice: [...ofVisit, 'reading'],
  weekend: ofVisit,
  holiday: [...ofVisit, 'name'],
  outsideYardHours: [...ofVisit, 'clock', 'from', 'to'],
  inThePast: ofVisit,
  clash: [...ofVisit, 'cohort', 'title', 'otherAt'],
  notKnownEmpty: ofAnimals,
  daysSinceCalving: [...ofDays, 'fewestDays', 'greatestDays'],
  calvingUnknown: ofDays,
  tooYoung: [...ofDays, 'fewestDays', 'greatestDays'],
  wrongClass: [...ofAnimals, 'classes'],
  inAnotherCohort: [...ofAnimals, 'cohorts'],
  authorityMissing: ofNeed,
  authorityShort: ofNeed,
  // dates of the longest-lasting permission that fits otherwise; it may also begin too late
  authorityExpired: [...ofNeed, 'validFrom', 'validTo'],
  authorityWrongClass: [...ofNeed, 'classes'],
  authorityWrongActive: [...ofNeed, 'authorised', 'authorisedUnit'],
  // gap and figures are absent when no single gap explains it
  windowMissed: [
    ...ofVisit,
    'gap?',
    'from?',
    'to?',
    'elapsedMinutes?',
    'overMinutes?',
    'leastMinutes?',
    'mostMinutes?',
  ],
  windowTight: [],
  headCountOnly: ['group', 'head'],
  protocolRetired: [],
  outsideRegion: [],
};
