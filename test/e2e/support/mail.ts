import { expect } from '@playwright/test';
import { type Letter, type OpenedLetter } from '../../../infra/fakes/mailbox/letters';
import { run } from './run';

async function ask<T>(where: string): Promise<T> {
  const answer = await fetch(`${run.mailbox}${where}`);
  if (!answer.ok) throw new Error(`The mailbox answers ${answer.status} to ${where}.`);
  return (await answer.json()) as T;
}

async function mailsTo(address: string, subject: RegExp): Promise<Letter[]> {
  const letters = await ask<Letter[]>(`/api/mails?to=${encodeURIComponent(address)}`);
  return letters.filter((letter) => subject.test(letter.subject));
}

/** The newest mail of this subject to an address, once it has come. */
export async function mail(address: string, subject: RegExp): Promise<OpenedLetter> {
  let newest: Letter | undefined;
  await expect
    .poll(async () => (newest = (await mailsTo(address, subject))[0]) !== undefined, {
      message: `a mail "${subject.source}" to ${address}`,
      timeout: 45_000,
    })
    .toBe(true);
  return ask<OpenedLetter>(`/api/mails/${newest?.id}`);
}

/** The address in a mail that leads to a page below `path`. */
export function linkIn(letter: OpenedLetter, path: string): string {
  const links = letter.text.match(/https?:\/\/[^\s)>\]]+/g) ?? [];
  const found = links.find((link) => new URL(link).pathname.startsWith(path));
  if (!found) throw new Error(`No link to ${path} in the mail:\n${letter.text}`);
  return found;
}

export async function attachment(letter: Letter, at: number): Promise<Buffer> {
  const answer = await fetch(`${run.mailbox}/mails/${letter.id}/attachments/${at}`);
  if (!answer.ok) throw new Error(`Attachment ${at} of mail ${letter.id} is not there.`);
  return Buffer.from(await answer.arrayBuffer());
}
