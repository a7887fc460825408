export const people = {} as const;
