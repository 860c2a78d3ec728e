import { type Page } from '@playwright/test';
import { attachment, mail } from './support/mail';
import { expect, test } from './support/test';

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
    expect((await attachment(letter, 0)).subarray(0, 5).toString()).toBe('%PDF-');
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
