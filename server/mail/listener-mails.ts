import type { MailContent } from './mails.ts';

/**
 * A listener's session as mail and calendar tell of it. The title is the neutral one; nothing here names a cable, a maker,
 * or the organisation, which may be a maker.
 */
export type ListenerInvitation = {
  readonly title: string;
  readonly number: number;
  readonly room: string;
  readonly plannedAt: Date;
  readonly timeZone: string;
  readonly minutes: number;
  readonly invitedBy: string;
  /** The personal link. */
  readonly url: string;
};

/** "Saturday, 5 December 2026 at 19:00 (Europe/Paris)" */
function whenOf({ plannedAt, timeZone }: ListenerInvitation): string {
  const words = new Intl.DateTimeFormat('en-GB', { dateStyle: 'full', timeStyle: 'short', timeZone }).format(plannedAt);
  return `${words} (${timeZone})`;
}

const whereAndWhen = (to: ListenerInvitation) => `${whenOf(to)}, in ${to.room}, for about ${to.minutes} minutes.`;

const footer =
  'You get this because somebody who plans listening sessions entered your address. Behind the link you can have it erased. Keep the link to yourself: it is your seat.';

function mailWithLink(
  to: ListenerInvitation,
  subject: string,
  label: string,
  paragraphs: readonly string[],
): MailContent {
  return { subject: `${to.title}: ${subject}`, paragraphs, action: { label, url: to.url }, footer };
}

/** A seat is offered. */
export function listenerInvitationMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'you are invited to listen', 'Say whether you come', [
    `${to.invitedBy} invites you to a listening session: ${whereAndWhen(to)}`,
    'You hear recordings, one after the other, and say what you hear on your phone. You need no account.',
    'The link is yours alone: say whether you come, change your mind, and take your seat in the room by it.',
  ]);
}

/** Every seat is offered already. */
export function waitingMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'you are on the waiting list', 'See your place', [
    `${to.invitedBy} invites you to a listening session: ${whereAndWhen(to)}`,
    'Every seat is taken for now. You are on the waiting list, and get a mail as soon as a seat is yours.',
  ]);
}

/** A seat became free for whoever waited longest. */
export function movedUpMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'a seat is yours', 'Say whether you come', [
    `A seat has become free, and it is yours: ${whereAndWhen(to)}`,
    'Please say whether you come, so that it can go to somebody else if you do not.',
  ]);
}

/** Said no, then yes, and a seat was free. */
export function acceptedAfterAllMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'you come after all', 'Open your invitation', [`You have a seat again: ${whereAndWhen(to)}`]);
}

/** Said no. */
export function declinedMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'you do not come', 'Change your mind', [
    `You said that you do not come on ${whenOf(to)}. Your seat is free for somebody else.`,
    'Until the session begins you can change your mind by the same link; if every seat is taken then, you wait for one.',
  ]);
}

/** Another time. */
export function movedMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'the session has moved', 'Say whether you come', [
    `The listening session now takes place at another time: ${whereAndWhen(to)}`,
    'Please say again whether you come. Your seat is kept for you, and your link stays the same.',
  ]);
}

/** Another room, the same time. */
export function otherRoomMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'another room', 'Open your invitation', [
    `The listening session takes place in another room: ${whereAndWhen(to)}`,
    'What you answered stands.',
  ]);
}

/** Moved, to whoever waits. */
export function movedWhileWaitingMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'the session has moved', 'See your place', [
    `The listening session has moved: ${whereAndWhen(to)}`,
    'You are still on the waiting list, and get a mail as soon as a seat is yours.',
  ]);
}

/** A day before. */
export function reminderMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'a reminder of your session', 'Open your invitation', [
    `This is a reminder of the listening session that has a seat for you: ${whereAndWhen(to)}`,
    'If you cannot come, please say so by the link, so that somebody else can.',
  ]);
}

/** The session does not take place. */
export function cancelledMail(to: ListenerInvitation): MailContent {
  return mailWithLink(to, 'the session is cancelled', 'Open your invitation', [
    `The listening session on ${whenOf(to)} does not take place.`,
    'There is nothing to do. If another session is planned, you may be invited again.',
  ]);
}

/** The invitation was taken back; its link has ended. */
export function withdrawnMail(to: ListenerInvitation): MailContent {
  return {
    subject: `${to.title}: your invitation is withdrawn`,
    paragraphs: [`Your invitation to the listening session on ${whenOf(to)} is withdrawn, and its link has ended.`],
    action: null,
    footer: 'You get this because somebody who plans listening sessions entered your address.',
  };
}
