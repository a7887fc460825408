import ICAL from 'ical.js';

export interface ReadEntry {
  uid: string;
  summary: string;
  description: string;
  location: string;
  status: string;
  sequence: number;
  stamp: string;
  modified: string;
  start: Date;
  end: Date;
  categories: string;
}

const textOf = (component: ICAL.Component, name: string): string => String(component.getFirstPropertyValue(name) ?? '');

/** Reads an iCalendar object with a parser that is not ours. */
export function readEntries(text: string): ReadEntry[] {
  return new ICAL.Component(ICAL.parse(text) as string)
    .getAllSubcomponents('vevent')
    .map((component) => {
      const event = new ICAL.Event(component);
      return {
        uid: event.uid,
        summary: event.summary,
        description: event.description,
        location: event.location,
        status: textOf(component, 'status'),
        sequence: event.sequence,
        stamp: textOf(component, 'dtstamp'),
        modified: textOf(component, 'last-modified'),
        start: event.startDate.toJSDate(),
        end: event.endDate.toJSDate(),
        categories: textOf(component, 'categories'),
      };
    })
    .sort((a, b) => a.start.getTime() - b.start.getTime());
}

/** Rules of RFC 5545 sections 3.1, 3.4, 3.6 and RFC 7986 that every calendar keeps; gives what is broken. */
export function brokenRules(text: string): string[] {
  const broken: string[] = [];
  if (!text.endsWith('END:VCALENDAR\r\n')) broken.push('does not end in END:VCALENDAR and CRLF');
  if (/[^\r]\n|\r[^\n]/.test(text)) broken.push('a line that does not end in CRLF');
  for (const line of text.split('\r\n')) if (Buffer.byteLength(line) > 75) broken.push(`more than 75 octets: ${line}`);
  const unfolded = text
    .replace(/\r\n[ \t]/g, '')
    .split('\r\n')
    .filter(Boolean);
  for (const line of unfolded) if (!/^[A-Z-]+[;:]/.test(line)) broken.push(`no property name: ${line}`);
  for (const line of unfolded)
    if (/^(DTSTART|DTEND|DTSTAMP|LAST-MODIFIED)/.test(line) && !/^[A-Z-]+:\d{8}T\d{6}Z$/.test(line))
      broken.push(`not a UTC instant: ${line}`);
  for (const must of [
    'VERSION:2.0',
    'PRODID:',
    'REFRESH-INTERVAL;VALUE=DURATION:PT1H',
    'X-PUBLISHED-TTL:PT1H',
    'NAME:',
    'X-WR-CALNAME:',
  ])
    if (!unfolded.some((line) => line.startsWith(must))) broken.push(`missing ${must}`);
  return broken;
}
