/** The secret out of the last part of the path, `<secret>.ics`; null when it can't be one. */
export const secretOf = (part: string): string | null => /^([A-Za-z0-9_-]{43})(?:\.ics)?$/.exec(part)?.[1] ?? null;

/** Where a calendar is read; whoever has it reads the calendar, with no other key. */
export const calendarUrl = (publicUrl: string, secret: string): string => `${publicUrl}/api/calendar/${secret}.ics`;
