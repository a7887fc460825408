export const cohorts = {} as const;
