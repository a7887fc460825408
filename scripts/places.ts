import type { DemoRole } from './system/people';

/** Ids that stand in a place's path, resolved from the demo data. */
export interface PlaceIds {
  cohortId: string;
  planningCohortId: string;
  taskId: string;
  protocolId: string;
  versionId: string;
  libraryId: string;
  animalId: string;
  propertyId: string;
}

export interface Place {
  /** Names its pictures: `today` gives shots/today-phone-light.png and so on. */
  name: string;
  path(ids: PlaceIds): string;
  /** Who looks at it; null is a stranger. */
  who: DemoRole | null;
  /** Console errors that belong to it, such as the one of an address that does not exist. */
  expected?: RegExp;
  /** Pictures of it that stand in the README, such as `wide-light`. */
  readme?: readonly string[];
}

/** Every place of the product: pictured by `npm run shots`, and looked at by the accessibility test. */
export const places: readonly Place[] = [
  { name: 'sign-in', path: () => '/sign-in', who: null },
  { name: 'reset', path: () => '/reset', who: null },
  {
    name: 'invitation-unknown',
    path: () => '/invitation/there-is-no-such-invitation',
    who: null,
    expected: /status of 410/,
  },
  { name: 'not-found', path: () => '/no/such/place', who: null },
  { name: 'today', path: () => '/', who: 'manager', readme: ['phone-light'] },
  { name: 'task', path: ({ taskId }) => `/task/${taskId}`, who: 'staff', readme: ['phone-dark'] },
  { name: 'cohorts', path: () => '/cohorts', who: 'manager' },
  { name: 'cohort', path: ({ cohortId }) => `/cohorts/${cohortId}`, who: 'manager', readme: ['wide-light'] },
  { name: 'cohort-new', path: () => '/cohorts/new', who: 'manager' },
  {
    name: 'cohort-plan',
    path: ({ planningCohortId }) => `/cohorts/${planningCohortId}/plan`,
    who: 'vet',
    readme: ['wide-dark'],
  },
  { name: 'calendar', path: () => '/calendar', who: 'manager' },
  { name: 'herd', path: () => '/herd', who: 'manager' },
  { name: 'herd-import', path: () => '/herd/import', who: 'manager' },
  { name: 'animal', path: ({ animalId }) => `/herd/${animalId}`, who: 'manager' },
  { name: 'medicines', path: () => '/medicines', who: 'manager' },
  { name: 'people', path: () => '/people', who: 'manager' },
  { name: 'more', path: () => '/more', who: 'manager' },
  { name: 'protocols', path: () => '/protocols', who: 'vet' },
  { name: 'protocol', path: ({ protocolId }) => `/protocols/${protocolId}`, who: 'vet' },
  {
    name: 'protocol-version',
    path: ({ versionId }) => `/protocols/version/${versionId}`,
    who: 'vet',
    readme: ['wide-light'],
  },
  { name: 'protocol-library', path: ({ libraryId }) => `/protocols/library/${libraryId}`, who: 'vet' },
];
