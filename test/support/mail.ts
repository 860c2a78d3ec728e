import { type Mailbox } from '../../infra/fakes/mailbox/mailbox';
import { sendPlatformMails } from '../../server/src/features/platform-mails/send-platform-mails';
import { type TestServer } from './app';

/** Sends what waits, as the worker would, and answers with the newest mail to an address. */
export async function newestMail(server: TestServer, mailbox: Mailbox, to: string) {
  await sendPlatformMails(server.config.mail);
  const [letter] = mailbox.letters.list({ to });
  if (!letter) throw new Error(`No mail came to ${to}.`);
  const opened = await mailbox.letters.open(letter.id);
  if (!opened) throw new Error(`The mail to ${to} cannot be opened.`);
  return opened;
}

/** The secret of a mailed link. */
export function tokenIn(letter: { text: string }): string {
  const token = /(?:#token=|\/invitations\/)([A-Za-z0-9_-]{43})/.exec(letter.text)?.[1];
  if (!token) throw new Error(`There is no link in: ${letter.text}`);
  return token;
}
