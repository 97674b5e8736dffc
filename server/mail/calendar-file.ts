import { TZDate } from '@date-fns/tz';
import ical, { ICalAttendeeRole, ICalAttendeeStatus, ICalCalendarMethod, ICalEventStatus } from 'ical-generator';
import { tzlib_get_ical_block } from 'timezones-ical-library';
import type { Deps } from '../deps.ts';
import type { ListenerInvitation } from './listener-mails.ts';

export type CalendarMethod = 'REQUEST' | 'CANCEL' | 'PUBLISH';

type CalendarEntry = ListenerInvitation & {
  readonly method: CalendarMethod;
  /** The same for ever for one listener and session. */
  readonly uid: string;
  /** Rises with every file that is sent for this entry. */
  readonly sequence: number;
  /** Whom REQUEST and CANCEL are for; a published file has no attendee. */
  readonly attendee: string | null;
};

/** The address that mail comes from, bare: "Name <address>" without its name. */
export function senderAddress({ smtp, publicUrl }: Deps['config']): string {
  const address = /<([^<>]+)>/.exec(smtp?.from ?? '')?.[1] ?? smtp?.from;
  return address?.trim() ?? `fairlead@${new URL(publicUrl).hostname}`;
}

/**
 * The zone's VTIMEZONE with the name that it bears, which for an older name of a zone is the present one. UTC needs none:
 * its times end in Z.
 */
function zoneOf(timeZone: string): { name: string; block: string } | null {
  if (timeZone === 'UTC') return null;
  const block = [tzlib_get_ical_block(timeZone)].flat()[0] ?? '';
  const name = /^BEGIN:VTIMEZONE\r\nTZID:(.+)\r\n/.exec(block)?.[1];
  return name === undefined ? null : { name, block: `${block}\r\n` };
}

/**
 * One listener's session as a calendar file (RFC 5545), for mail (RFC 5546: REQUEST, CANCEL) or for keeping (PUBLISH).
 * It bears the neutral title, the room and the personal link. Answers are given by the link, so none is asked for here.
 */
export function calendarFile({ config, clock }: Deps, entry: CalendarEntry): string {
  const { method, uid, sequence, attendee, title, room, plannedAt, minutes, timeZone, url, invitedBy } = entry;
  const zone = zoneOf(timeZone);
  const startsAt = plannedAt.getTime();
  const local = (at: number) => (zone === null ? new Date(at) : new TZDate(at, zone.name));
  const calendar = ical({
    prodId: { company: 'Fairlead', product: 'Fairlead', language: 'EN' },
    method: ICalCalendarMethod[method],
    // The zone stands at the event alone: a zone of the whole calendar would take the Z from DTSTAMP.
    ...(zone === null ? {} : { timezone: { name: null, generator: () => zone.block } }),
  });
  const isCancelled = method === 'CANCEL';
  calendar.createEvent({
    id: uid,
    sequence,
    stamp: new Date(clock.now()),
    start: local(startsAt),
    end: local(startsAt + minutes * 60_000),
    ...(zone === null ? {} : { timezone: zone.name }),
    summary: `${title}: listening session`,
    location: room,
    ...(isCancelled ? {} : { description: `Say whether you come, and take your seat: ${url}`, url }),
    status: isCancelled ? ICalEventStatus.CANCELLED : ICalEventStatus.CONFIRMED,
    organizer: { name: `${invitedBy} by Fairlead`, email: senderAddress(config) },
    attendees:
      attendee === null
        ? []
        : [
            {
              email: attendee,
              name: attendee,
              rsvp: false,
              role: ICalAttendeeRole.REQ,
              status: ICalAttendeeStatus.NEEDSACTION,
            },
          ],
  });
  return calendar.toString();
}
