import { v7 as uuid } from 'uuid';
import { type Mailbox } from '../../infra/fakes/mailbox/mailbox';
import { platformRow, platformRows, withPlatform } from '../../server/src/core/database/tenancy';
import { queuePlatformMail } from '../../server/src/features/platform-mails/queue-platform-mail';
import {
  sendPlatformMails,
  sweepPlatformMails,
} from '../../server/src/features/platform-mails/send-platform-mails';
import { type TestServer } from '../support/app';
import { setUpMailServer } from '../support/set-ups';

interface Row {
  state: string;
  attempt: number;
  last_error: string | null;
  waits: boolean;
  message_id: string;
}

describe('mails of sign-in and the platform', () => {
  let server: TestServer;
  let mailbox: Mailbox;
  let to: string;

  setUpMailServer((made) => ({ server, mailbox } = made));
  beforeEach(() => {
    to = `${uuid().slice(-8)}@people.example`;
    mailbox.setMode('normal');
  });

  const queue = (dedupeKey = uuid()) =>
    queuePlatformMail({ to, template: 'password_changed', params: { name: 'Rosa' }, dedupeKey });
  const send = () => sendPlatformMails(server.config.mail);
  const found = async () =>
    (await platformRow<Row>(
      `select state, attempt, last_error, next_attempt_at > now() as waits, message_id
       from platform_mails where recipient = $to`,
      { to },
    )) as Row;
  const due = () =>
    platformRows('update platform_mails set next_attempt_at = now() where recipient = $to', { to });
  const received = () => mailbox.letters.list({ to });

  it('are sent once, under an id made from their row', async () => {
    await queue();
    await Promise.all([send(), send(), send()]);
    await send();
    expect(received()).toHaveLength(1);
    expect(await found()).toMatchObject({ state: 'sent', attempt: 1, last_error: null });
    expect(received()[0]?.messageId).toBe((await found()).message_id);
  });

  it('say the same in text and HTML', async () => {
    await queue();
    await send();
    const letter = await mailbox.letters.open(received()[0]?.id ?? '');
    expect(letter?.text).toContain('Good day, Rosa');
    expect(letter?.html).toContain('Good day, Rosa');
    expect(letter?.headers['auto-submitted']).toBe('auto-generated');
  });

  it('exist only when what they tell of was written', async () => {
    const key = uuid();
    await expect(
      withPlatform(async () => {
        await queue(key);
        throw new Error('the write after it failed');
      }),
    ).rejects.toThrow();
    expect(await found()).toBeUndefined();
    await queue(key);
    await queue(key);
    const rows = await platformRows('select 1 from platform_mails where dedupe_key = $key', {
      key,
    });
    expect(rows).toHaveLength(1);
  });

  it('are tried again later when the server cannot take them now', async () => {
    await queue();
    mailbox.setMode('reject-4xx', 1, to);
    await send();
    expect(await found()).toMatchObject({ state: 'waiting', attempt: 1, waits: true });
    await send();
    expect((await found()).attempt).toBe(1);
    await due();
    await send();
    expect(await found()).toMatchObject({ state: 'sent', attempt: 2 });
    expect(received()).toHaveLength(1);
  });

  it('fail visibly when they are refused for good', async () => {
    await queue();
    mailbox.setMode('reject-5xx', 1, to);
    await send();
    expect(await found()).toMatchObject({ state: 'failed', attempt: 1 });
    expect((await found()).last_error).toContain('550');
  });

  it('are uncertain, and never sent again by themselves, when the answer was lost', async () => {
    await queue();
    mailbox.setMode('drop-after-data', 1, to);
    await send();
    expect(await found()).toMatchObject({ state: 'uncertain', attempt: 1 });
    await due();
    await send();
    await sweepPlatformMails();
    await send();
    expect(received()).toHaveLength(1);
  });

  it('are uncertain when the process ended in the middle', async () => {
    await queue();
    await platformRows(
      `update platform_mails set state = 'handing_over', attempt = 1,
         lease_until = now() - interval '1 second' where recipient = $to`,
      { to },
    );
    await sweepPlatformMails();
    expect(await found()).toMatchObject({ state: 'uncertain' });
    await send();
    expect(received()).toHaveLength(0);
  });

  it('wait when there is no mail server at all', async () => {
    await queue();
    await sendPlatformMails({ ...server.config.mail, smtpUrl: 'smtp://127.0.0.1:9' });
    expect(await found()).toMatchObject({ state: 'waiting', attempt: 1, waits: true });
  });
});
