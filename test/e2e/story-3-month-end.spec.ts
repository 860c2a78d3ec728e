import { type Page } from '@playwright/test';
import { pdfText } from '../support/pdf-text';
import { attachment, mail } from './support/mail';
import { expect, test } from './support/test';

/** The charges of a statement as its PDF has them, in minor units: each document, then their sum. */
function chargesIn(pdf: Buffer): { charged: number; tax: number; total: number }[] {
  const [, table = ''] = pdfText(pdf).split('What stands behind it');
  const amount = String.raw`(-?[\d,]+\.\d\d)`;
  const triple = new RegExp(`^${amount}\\n${amount}\\n${amount}$`, 'gm');
  return [...table.matchAll(triple)].map(([, ...texts]) => {
    const minor = texts.map((text) => Number(text.replace(/[,.]/g, '')));
    const [charged = NaN, tax = NaN, total = NaN] = minor;
    return { charged, tax, total };
  });
}

async function enterCard(page: Page, number: string): Promise<void> {
  await page.getByLabel('Card number').fill(number);
  await page.getByLabel(/^Expires/).fill('12 / 34');
  await page.getByLabel('Security code').fill('123');
  await page.getByLabel('Name on the card').fill('Marguerite Alder');
  await page.getByRole('button', { name: /^Pay / }).click();
}

test('a month is closed once, mailed, and paid by card until nothing is owed', async ({
  visitor,
  works,
}) => {
  const owner = await visitor(works.owner);

  await test.step('the shop takes cards', async () => {
    await owner.goTo('/shop/settings', 'Settings');
    await owner.press('Take cards');
    await owner.sees(/Clients can pay their statements by card/);
  });

  await test.step('the owner closes the month, told what it means in figures', async () => {
    await owner.goTo('/shop/month-close', /^Close /);
    await owner.sees(/statements over \$[\d,.]+ of new charges/);
    await owner.press(/^Close \w+ \d{4}$/);
    await owner.press(/^Close \w+ \d{4}$/, owner.page.getByRole('dialog'));
    await expect(owner.page.getByRole('heading', { level: 2 }).first()).toBeVisible();
  });

  await test.step('its progress survives a reload, until every mail is sent', async () => {
    await owner.page.reload();
    await expect(owner.page.getByRole('heading', { level: 2, name: 'Closed' })).toBeVisible({
      timeout: 60_000,
    });
    await owner.sees(/8 statements made, 8 mails\s+sent\./);
    await owner.arrive(/./);
  });

  const month = await test.step('each statement came by mail, with its PDF', async () => {
    const letter = await mail(works.clientOwner, /^Statement for .*Foxglove Lane/);
    expect(letter.html).toBeTruthy();
    const [pdf] = letter.attachments;
    expect(pdf).toMatchObject({ type: 'application/pdf' });
    const charges = chargesIn(await attachment(letter, 0));
    const stated = charges.pop();
    expect(charges.length).toBeGreaterThan(0);
    for (const { charged, tax, total } of charges) expect(charged + tax).toBe(total);
    for (const column of ['charged', 'tax', 'total'] as const) {
      expect(charges.reduce((sum, one) => sum + one[column], 0)).toBe(stated?.[column]);
    }
    return /Statement for (\w+ \d{4})/.exec(letter.subject)?.[1] as string;
  });

  const client = await visitor(works.clientOwner);

  await test.step('the client owner sees what is owed, and what was done for it', async () => {
    await client.arrive('Alder & Finch Laundries');
    const owed = client.page.getByRole('link', { name: `Statement of ${month}` });
    await expect(owed.first()).toBeVisible();
    await client.goTo('/client/statements', 'Statements');
    await client.row('Foxglove Lane').filter({ hasText: month }).getByRole('link').first().click();
    await client.arrive(new RegExp(month));
    await client.sees('What was done');
    await client.sees(/All \d+ checks of its figures hold/);
    const opened = client.page.waitForResponse((answer) => answer.url().endsWith('/pdf'));
    await client.press('Open the PDF');
    expect((await opened).headers()['content-type']).toBe('application/pdf');
  });

  await test.step('a declined card pays nothing', async () => {
    await client.page.getByRole('button', { name: /^Pay/ }).first().click();
    await enterCard(client.page, '4000 0000 0000 0002');
    await expect(client.page.getByRole('alert')).toBeVisible();
  });

  await test.step('a good one pays the balance to nothing', async () => {
    await enterCard(client.page, '4242 4242 4242 4242');
    await client.heading('Paid');
    await client.sees(/Foxglove Lane owes\s+\$0\.00\s+now/);
    await client.arrive('Paid');
    await client.goTo('/client/statements', 'Statements');
    await client.row('Foxglove Lane').filter({ hasText: month }).getByRole('link').first().click();
    await client.sees('There is nothing to pay on it.');
  });

  await test.step('the shop sees the payment', async () => {
    await owner.goTo('/shop/payments', 'Payments');
    await expect(owner.row('Foxglove Lane').first()).toContainText(/card/i);
  });
});
