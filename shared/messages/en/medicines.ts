export const medicines = {} as const;
