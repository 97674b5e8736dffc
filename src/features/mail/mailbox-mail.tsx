import { useState } from 'react';
import type { MailboxMail as Mail } from '#shared/contracts/mail.ts';
import { formatDateTime } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Facts } from '../../ui/facts.tsx';

const linksIn = (text: string) => [...new Set(text.match(/https?:\/\/[^\s<>"]+/g))];

/** The plain text and its links, and the HTML as a reader shows it, shut off from everything. */
export function MailboxMail({ mail }: { mail: Mail }) {
  const [isShown, setShown] = useState(false);
  const links = linksIn(mail.text);
  return (
    <div className="grid gap-x-14 gap-y-10 lg:grid-cols-2">
      <section aria-labelledby="mail-text" className="flex min-w-0 flex-col gap-5">
        <Facts
          facts={[
            { label: 'To', value: mail.recipient, isWords: true },
            { label: 'Written', value: formatDateTime(mail.createdAt), isWords: true },
          ]}
        />
        <h2 id="mail-text" className="text-xl">
          Plain text
        </h2>
        <p className="whitespace-pre-wrap [overflow-wrap:anywhere]">{mail.text}</p>
        {links.length === 0 ? null : (
          <ul aria-label="Links in this mail" className="border-t border-rule pt-4">
            {links.map((link) => (
              <li key={link}>
                <a href={link} className="inline-flex min-h-12 items-center [overflow-wrap:anywhere]">
                  {link}
                </a>
              </li>
            ))}
          </ul>
        )}
        {mail.calendar === null ? null : <CalendarFile {...mail.calendar} />}
      </section>
      <section aria-labelledby="mail-html" className="flex min-w-0 flex-col gap-5">
        <h2 id="mail-html" className="text-xl">
          As HTML
        </h2>
        {isShown ? (
          <iframe
            title={`${mail.subject}, as HTML`}
            sandbox=""
            srcDoc={mail.html}
            className="h-[34rem] w-full rounded border border-rule"
          />
        ) : (
          <Button className="self-start" onClick={() => setShown(true)}>
            Show it as HTML
          </Button>
        )}
      </section>
    </div>
  );
}

/** What a mail program offers to put into the calendar, or to take out of it. */
function CalendarFile({ method, content }: { method: string; content: string }) {
  return (
    <div className="flex flex-col gap-3">
      <h3 className="text-lg">Calendar file, {method}</h3>
      <a
        href={`data:text/calendar;charset=utf-8,${encodeURIComponent(content)}`}
        download="session.ics"
        className="inline-flex min-h-12 items-center self-start"
      >
        Download session.ics
      </a>
      <details>
        <summary className="cursor-pointer py-2 text-soft">Read it</summary>
        <pre className="whitespace-pre-wrap font-mono text-sm [overflow-wrap:anywhere]">{content}</pre>
      </details>
    </div>
  );
}
