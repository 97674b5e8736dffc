import type { SmtpReceiver } from './smtp-receiver.ts';

/** The token behind the # of the link in a mail. */
export async function tokenInMail(receiver: SmtpReceiver, recipient: string, words: string): Promise<string> {
  const mail = await receiver.to(recipient, words);
  const token = mail.text?.match(/\S+#([\w-]+)/)?.[1];
  if (token === undefined) throw new Error(`there is no link in: ${mail.text}`);
  receiver.mails.splice(receiver.mails.indexOf(mail), 1);
  return token;
}
