import ical, { ICalEventStatus } from 'ical-generator';

import type { CalendarEntry } from './entry';
import { escapeText } from './text';

/**
 * Writes an iCalendar object (RFC 5545). All times are UTC instants without TZID: a single moment needs no zone
 * description, every reader shows it in its own zone, and none can be an hour out around a clock change.
 */
export function writeCalendar(name: string, entries: readonly CalendarEntry[]): string {
  const calendar = ical({
    // the generator writes the name as it is given
    name: escapeText(name),
    prodId: { company: 'Yardbell', product: 'Yardbell', language: 'EN' },
    // a suggestion to readers (RFC 7986 section 5.7); they look when they like
    ttl: 3600,
  });
  for (const entry of entries)
    calendar.createEvent({
      id: entry.uid,
      sequence: entry.sequence,
      stamp: entry.stamp,
      lastModified: entry.stamp,
      start: entry.start,
      end: entry.end,
      summary: entry.summary,
      description: entry.description,
      location: { title: entry.location },
      categories: [{ name: entry.category }],
      status: entry.cancelled ? ICalEventStatus.CANCELLED : ICalEventStatus.CONFIRMED,
      url: entry.url,
    });
  // content lines end in CRLF, the last one too; the generator leaves that one out
  return `${calendar.toString()}\r\n`;
}
