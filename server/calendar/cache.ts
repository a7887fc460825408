export interface WrittenCalendar {
  text: string;
  etag: string;
}

/** Calendars as last written, one a link: writing a thousand entries takes half a second, and readers ask every hour. */
export class CalendarCache {
  private readonly kept = new Map<string, { state: string; written: WrittenCalendar }>();

  constructor(private readonly most = 500) {}

  /** The calendar of the link in that state of the plan; `write` makes it when another state was kept. */
  async get(linkId: string, state: string, write: () => Promise<WrittenCalendar>): Promise<WrittenCalendar> {
    const known = this.kept.get(linkId);
    const written = known?.state === state ? known.written : await write();
    // the map keeps the order of insertion: the link read longest ago is the first to go
    this.kept.delete(linkId);
    this.kept.set(linkId, { state, written });
    const oldest = this.kept.keys().next().value;
    if (this.kept.size > this.most && oldest !== undefined) this.kept.delete(oldest);
    return written;
  }
}
