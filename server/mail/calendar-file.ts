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

/** The zone's VTIMEZONE. UTC needs none: its times end in Z. */
function zoneBlock(timeZone: string): string | null {
  if (timeZone === 'UTC') return null;
  const [block] = [tzlib_get_ical_block(timeZone)].flat();
  return typeof block === 'string' && block.startsWith('BEGIN:VTIMEZONE') ? `${block}\r\n` : null;
}

/**
 * One listener's session as a calendar file (RFC 5545), for mail (RFC 5546: REQUEST, CANCEL) or for keeping (PUBLISH).
 * It bears the neutral title, the room and the personal link. Answers are given by the link, so none is asked for here.
 */
export function calendarFile({ config, clock }: Deps, entry: CalendarEntry): string {
  const { method, uid, sequence, attendee, title, room, plannedAt, minutes, timeZone, url, invitedBy } = entry;
  const block = zoneBlock(timeZone);
  const zone = block === null ? 'UTC' : timeZone;
  const startsAt = plannedAt.getTime();
  const local = (at: number) => (block === null ? new Date(at) : new TZDate(at, zone));
  const calendar = ical({
    prodId: { company: 'Fairlead', product: 'Fairlead', language: 'EN' },
    method: ICalCalendarMethod[method],
    ...(block === null ? {} : { timezone: { name: zone, generator: () => block } }),
  });
  const isCancelled = method === 'CANCEL';
  calendar.createEvent({
    id: uid,
    sequence,
    stamp: new Date(clock.now()),
    start: local(startsAt),
    end: local(startsAt + minutes * 60_000),
    ...(block === null ? {} : { timezone: zone }),
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
