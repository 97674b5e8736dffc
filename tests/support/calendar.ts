import ICAL from 'ical.js';
import type { Email } from 'postal-mime';

/** The calendar file of a mail as an independent reader of RFC 5545 understands it. */
export function calendarIn({ attachments }: Email) {
  const part = attachments.find(({ mimeType }) => mimeType === 'text/calendar');
  if (part === undefined) throw new Error('this mail has no calendar');
  const { content, method } = part;
  const text = typeof content === 'string' ? content : new TextDecoder().decode(content);
  return { ...readCalendar(text), mimeMethod: method };
}

export function readCalendar(text: string) {
  const calendar = new ICAL.Component(ICAL.parse(text));
  const event = calendar.getFirstSubcomponent('vevent');
  if (event === null) throw new Error('a calendar without an event');
  const zones = calendar.getAllSubcomponents('vtimezone').map((zone) => new ICAL.Timezone(zone));
  const value = (name: string) => String(event.getFirstPropertyValue(name) ?? '');
  const timeOf = (name: string) => {
    const property = event.getFirstProperty(name);
    const zone = zones.find(({ tzid }) => tzid === property?.getParameter('tzid'));
    const time = property?.getFirstValue() as ICAL.Time;
    if (zone !== undefined) time.zone = zone;
    return time.toJSDate().toISOString();
  };
  return {
    text,
    zones: zones.map(({ tzid }) => tzid),
    method: String(calendar.getFirstPropertyValue('method')),
    version: String(calendar.getFirstPropertyValue('version')),
    uid: value('uid'),
    sequence: Number(value('sequence')),
    status: value('status'),
    summary: value('summary'),
    location: value('location'),
    // The scheme of an address is the same in either case (RFC 3986, 3.1).
    organizer: value('organizer').toLowerCase(),
    attendee: value('attendee').toLowerCase(),
    stamp: value('dtstamp'),
    start: timeOf('dtstart'),
    end: timeOf('dtend'),
    /** Every line of the file as it travels: no longer than 75 octets (RFC 5545, 3.1). */
    longestLine: Math.max(...text.split(/\r?\n/).map((line) => new TextEncoder().encode(line).length)),
  };
}
