import type { ListenerInvitation } from './listener-mails.ts';
import type { MailContent } from './mails.ts';

/** Somebody is asked to watch a session, by the neutral title alone. */
export function observerMail(to: ListenerInvitation): MailContent {
  const when = new Intl.DateTimeFormat('en-GB', {
    dateStyle: 'full',
    timeStyle: 'short',
    timeZone: to.timeZone,
  }).format(to.plannedAt);
  return {
    subject: `${to.title}: you are asked to watch a session`,
    paragraphs: [
      `${to.invitedBy} asks you to watch a listening session as a witness: ${when} (${to.timeZone}), in ${to.room}, for about ${to.minutes} minutes.`,
      'Be in the room, and keep the page behind this link open while you watch. It shows what happens and when, and never what is right.',
      'At the end you can sign what you watched. Somebody with another duty in the study is no witness.',
    ],
    action: { label: 'Watch the session', url: to.url },
    footer:
      'You get this because somebody who plans listening sessions entered your address. Keep the link to yourself.',
  };
}
