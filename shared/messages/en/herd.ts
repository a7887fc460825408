export const herd = {} as const;
