import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { createTransport } from 'nodemailer';
import { type Letter, type OpenedLetter } from './letters';
import { type Mailbox, startMailbox } from './mailbox';

const folder = mkdtempSync(path.join(tmpdir(), 'tumblewright-mailbox-'));
let mailbox: Mailbox;

beforeAll(async () => {
  mailbox = await startMailbox({ folder });
});
afterAll(async () => {
  await mailbox.close();
  rmSync(folder, { recursive: true, force: true });
});

function post(to: string, subject = 'Statement for November') {
  const transport = createTransport(mailbox.smtpUrl);
  return transport.sendMail({
    from: 'Harbour Appliance <post@harbour.example>',
    to,
    subject,
    messageId: '<statement-1@harbour.example>',
    text: 'See https://shop.example/s/1 (or call).',
    html: '<html><head></head><body><b>See</b> it<script>alert(1)</script></body></html>',
    attachments: [
      { filename: 'Auszug März.pdf', content: 'not really', contentType: 'application/pdf' },
    ],
  });
}

async function get<T>(where: string): Promise<T> {
  return (await (await fetch(mailbox.url + where)).json()) as T;
}

describe('the local mailbox', () => {
  it('keeps a mail with its parts and shows it', async () => {
    await post('Ada@Client.example');
    const [letter] = await get<Letter[]>('/api/mails?to=ada@client');
    expect(letter).toMatchObject({
      to: ['ada@client.example'],
      subject: 'Statement for November',
      messageId: '<statement-1@harbour.example>',
      answered: true,
    });
    const opened = await get<OpenedLetter>(`/api/mails/${letter?.id}`);
    expect(opened.text).toContain('https://shop.example/s/1');
    expect(opened.headers['from']).toContain('Harbour Appliance');

    const shown = await (await fetch(`${mailbox.url}/mails/${letter?.id}`)).text();
    expect(shown).toContain('<a href="https://shop.example/s/1">');
    expect(shown).toContain('<iframe sandbox="');
    const asHtml = await fetch(`${mailbox.url}/mails/${letter?.id}/html`);
    expect(asHtml.headers.get('content-security-policy')).toContain("default-src 'none'");
    const file = await fetch(`${mailbox.url}/mails/${letter?.id}/attachments/0`);
    expect(file.headers.get('content-disposition')).toContain("UTF-8''Auszug%20M%C3%A4rz.pdf");
    expect(await file.text()).toBe('not really');
    expect((await fetch(`${mailbox.url}/mails/999999`)).status).toBe(404);
  });

  it('escapes what a mail says', async () => {
    await post('eve@client.example', '<img src=x onerror=alert(1)>');
    const list = await (await fetch(`${mailbox.url}/?to=eve`)).text();
    expect(list).toContain('&lt;img src=x');
    expect(list).not.toContain('<img src=x');
  });

  it('loses its answer, refuses and is slow when told, for one address and so many times', async () => {
    const mode = (body: unknown) =>
      fetch(`${mailbox.url}/fake/mode`, { method: 'POST', body: JSON.stringify(body) });
    expect((await mode({ mode: 'nonsense' })).status).toBe(400);

    await mode({ mode: 'drop-after-data', times: 1, to: 'lost@client.example' });
    await post('other@client.example');
    await expect(post('lost@client.example')).rejects.toThrow(/closed|ECONNRESET/);
    const [lost] = mailbox.letters.list({ to: 'lost@' });
    expect(lost?.answered).toBe(false);
    await post('lost@client.example');
    expect(mailbox.letters.list({ to: 'lost@' })).toHaveLength(2);

    await mode({ mode: 'reject-4xx', times: 1 });
    await expect(post('a@client.example')).rejects.toMatchObject({ responseCode: 451 });
    await mode({ mode: 'reject-5xx', times: 1 });
    await expect(post('a@client.example')).rejects.toMatchObject({ responseCode: 550 });
    expect(mailbox.letters.list({ to: 'a@client' }).length).toBe(1);
    await mode({ mode: 'slow', times: 1 });
    const start = Date.now();
    await post('slow@client.example');
    expect(Date.now() - start).toBeGreaterThan(2_500);
  });

  it('has its mails after a restart', async () => {
    const before = mailbox.letters.list().map((letter) => letter.id);
    await mailbox.close();
    mailbox = await startMailbox({ folder });
    expect(mailbox.letters.list().map((letter) => letter.id)).toEqual(before);
    await post('after@client.example');
    expect(mailbox.letters.list()[0]?.id).not.toBe(before[0]);
  });
});
