export const protocols = {} as const;
