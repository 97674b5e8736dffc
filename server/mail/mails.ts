import type { Role } from '#shared/contracts/endpoint.ts';

/**
 * What a mail says. Plain text and HTML are both made from it, so that neither can say more than the other.
 *
 * Of a study a mail may carry the neutral title and nothing else: no template here takes a cable, a maker, a material
 * or a price.
 */
export type MailContent = {
  readonly subject: string;
  readonly paragraphs: readonly string[];
  readonly action: { readonly label: string; readonly url: string } | null;
  /** Why this came, and what to do if it should not have. */
  readonly footer: string;
};

const onDay = (at: Date, timeZone = 'UTC') =>
  `${new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeStyle: 'short', timeZone }).format(at)} (${timeZone})`;

export type StudyMail = { readonly title: string; readonly url: string };

type PlannedSession = {
  readonly number: number;
  readonly room: string;
  readonly plannedAt: Date;
  readonly timeZone: string;
};

/** A session was planned; to its proctor. */
export function sessionPlannedMail(study: StudyMail, session: PlannedSession): MailContent {
  return {
    subject: `${study.title}: session ${session.number} is yours to run`,
    paragraphs: [
      `You are the proctor of session ${session.number} of ${study.title}, in ${session.room}, on ${onDay(session.plannedAt, session.timeZone)}.`,
      'Its console leads you through the room check, the seating and every change.',
    ],
    action: { label: 'Open the console', url: study.url },
    footer: 'You get this because a manager named you as the proctor.',
  };
}

/** A session moved or does not take place; to its proctor. */
export function sessionChangedMail(
  study: StudyMail,
  session: PlannedSession,
  change: 'moved' | 'cancelled',
): MailContent {
  const what = `Session ${session.number} of ${study.title}, of which you are the proctor,`;
  return {
    subject: `${study.title}: session ${session.number} is ${change}`,
    paragraphs: [
      change === 'moved'
        ? `${what} now takes place in ${session.room}, on ${onDay(session.plannedAt, session.timeZone)}.`
        : `${what} on ${onDay(session.plannedAt, session.timeZone)} does not take place.`,
      'Whoever is invited to listen is told too.',
    ],
    action: { label: 'See the session', url: study.url },
    footer: 'You get this because a manager named you as the proctor.',
  };
}

/** A study was sealed; to its code holder. */
export function codesToDrawMail(study: StudyMail): MailContent {
  return {
    subject: `${study.title}: the blind codes are yours to draw`,
    paragraphs: [
      `${study.title} is sealed and names you as its code holder. Draw the blind codes, put a sleeve on every specimen, and confirm.`,
      'Keep to yourself which code is which: you alone know it until the study is closed.',
    ],
    action: { label: 'Go to the codes', url: study.url },
    footer: 'You get this because the sealed protocol names you as the code holder.',
  };
}

type BrokenRecord = { readonly title: string; readonly sequence: number | null };

/** The daily audit found what it had not found before; to the owners. */
export function auditFaultMail(broken: readonly BrokenRecord[], url: string): MailContent {
  return {
    subject: broken.length === 1 ? 'A record does not hold' : `${broken.length} records do not hold`,
    paragraphs: [
      'The daily audit verified every record and found what does not hold:',
      ...broken.map(({ title, sequence }) => (sequence === null ? `${title}.` : `${title}, at entry ${sequence}.`)),
      'Keep the database as it is, and compare it with a backup. Nothing that rests on such a record should be published.',
    ],
    action: { label: 'See what was found', url },
    footer: 'You get this as an owner of the organisation. It comes once for each finding.',
  };
}

const roleWords: Readonly<Record<Role, string>> = {
  owner: 'an owner',
  manager: 'a product manager',
  proctor: 'a proctor',
  reviewer: 'a reviewer',
};

/** Somebody is invited; to them. */
export function invitationMail(invitation: {
  readonly organisation: string;
  readonly invitedBy: string;
  readonly role: Role;
  readonly expiresAt: Date;
  readonly url: string;
}): MailContent {
  const { organisation, invitedBy, role, expiresAt, url } = invitation;
  return {
    subject: `${invitedBy} invites you to ${organisation} on Fairlead`,
    paragraphs: [
      `${invitedBy} invites you to join ${organisation} as ${roleWords[role]}.`,
      `The link works once, until ${onDay(expiresAt)}.`,
    ],
    action: { label: 'See the invitation', url },
    footer: 'If you do not know what this is about, do nothing: without the link nobody joins in your name.',
  };
}

/** A member has another role; to them. */
export function roleChangedMail({
  organisation,
  role,
  url,
}: {
  organisation: string;
  role: Role;
  url: string;
}): MailContent {
  return {
    subject: `You are now ${roleWords[role]} of ${organisation}`,
    paragraphs: [`Your role in ${organisation} has changed: you are ${roleWords[role]} from now on.`],
    action: { label: 'Open Fairlead', url },
    footer: 'You get this because an owner of the organisation changed your role.',
  };
}

/** A member was removed; to them. */
export function removedMail({ organisation }: { organisation: string }): MailContent {
  return {
    subject: `You are no longer a member of ${organisation}`,
    paragraphs: [
      `An owner of ${organisation} has ended your membership. What you did there stays on its records under your name.`,
      'Your sign-in stays, and so does your membership of any other organisation.',
    ],
    action: null,
    footer: 'If you think this is a mistake, ask an owner of the organisation.',
  };
}

/** Somebody forgot their password; to them. */
export function passwordResetMail({ url }: { url: string }): MailContent {
  return {
    subject: 'Set a new password for Fairlead',
    paragraphs: ['Somebody asked for a new password for this address. The link works once, for one hour.'],
    action: { label: 'Set a new password', url },
    footer: 'If it was not you, do nothing: your password stays as it is.',
  };
}

/** A password was set anew; to its person. */
export function passwordChangedMail({ url }: { url: string }): MailContent {
  return {
    subject: 'Your password for Fairlead was changed',
    paragraphs: ['Your password was set anew, and every place where you were signed in was signed out.'],
    action: null,
    footer: `If it was not you, set another password at once: ${url}`,
  };
}
