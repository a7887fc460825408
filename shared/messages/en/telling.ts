export const telling = {} as const;
