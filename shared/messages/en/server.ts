export const server = {} as const;
