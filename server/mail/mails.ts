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

const onDay = (at: Date) =>
  new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeStyle: 'short', timeZone: 'UTC' }).format(at);

export type StudyMail = { readonly title: string; readonly url: string };

/** A session was planned; to its proctor. */
export function sessionPlannedMail(
  study: StudyMail,
  session: { readonly number: number; readonly room: string; readonly plannedAt: Date },
): MailContent {
  return {
    subject: `${study.title}: session ${session.number} is yours to run`,
    paragraphs: [
      `You are the proctor of session ${session.number} of ${study.title}, in ${session.room}, on ${onDay(session.plannedAt)} (UTC).`,
      'Its console leads you through the room check, the seating and every change.',
    ],
    action: { label: 'Open the console', url: study.url },
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
