/** Raised when cached answers of an earlier program can't be read by this one. */
export const cacheVersion = '1';

/** What is fetched, by name. `program` covers everything that a change of plan or a record may change. */
export const keys = {
  me: () => ['me'] as const,
  program: () => ['program'] as const,
  work: () => ['program', 'work'] as const,
  today: (propertyId: string | null) => ['program', 'work', 'today', propertyId] as const,
  taskWork: (taskId: string) => ['program', 'work', 'task', taskId] as const,
  calendar: (from: string, to: string, propertyId: string | null) =>
    ['program', 'calendar', propertyId, from, to] as const,
  cohortLists: () => ['program', 'cohorts'] as const,
  cohorts: (propertyId: string | null) => ['program', 'cohorts', propertyId] as const,
  cohort: (cohortId: string) => ['program', 'cohort', cohortId] as const,
  plan: (cohortId: string, revision: number) => ['program', 'plan', cohortId, revision] as const,
  audit: (cohortId: string) => ['program', 'audit', cohortId] as const,
  medicines: (propertyId: string) => ['program', 'medicines', propertyId] as const,
  herd: () => ['program', 'herd'] as const,
  animals: (propertyId: string, filter: object) => ['program', 'herd', propertyId, filter] as const,
  animal: (animalId: string) => ['program', 'herd', 'animal', animalId] as const,
  allProtocols: () => ['protocols'] as const,
  protocols: () => ['protocols', 'list'] as const,
  protocol: (protocolId: string) => ['protocols', 'one', protocolId] as const,
  version: (versionId: string) => ['protocols', 'version', versionId] as const,
  library: () => ['library'] as const,
  libraryProtocol: (libraryId: string) => ['library', libraryId] as const,
  property: (propertyId: string) => ['property', propertyId] as const,
  people: (propertyId: string) => ['people', propertyId] as const,
  invitation: (token: string) => ['invitation', token] as const,
  calendarLinks: () => ['calendar-links'] as const,
};
