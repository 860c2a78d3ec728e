import { platformAdmin } from './support/works';
import { expect, test } from './support/test';

test('a platform admin puts a shop on another plan, pauses it and lets it go on', async ({
  visitor,
  pausable,
}) => {
  const admin = await visitor(platformAdmin);

  await test.step('finds the shop among all of them', async () => {
    await admin.arrive('Shops');
    await admin.page.getByRole('searchbox', { name: 'Search shops' }).fill(pausable.name);
    await admin.follow(pausable.name);
    await admin.arrive(pausable.name);
    await expect(admin.row(/Machines/)).toContainText('180');
  });

  await test.step('changes its plan, told what fits before', async () => {
    await admin.press('Change the plan');
    const plans = admin.page.getByLabel('Plan', { exact: true });
    await plans.selectOption({ label: (await plans.getByText(/^Depot,/).textContent()) ?? '' });
    await admin.sees('Everything the shop has fits into Depot.');
    await admin.fill('Why', 'They asked for room to grow.');
    await admin.press('Change the plan');
    await admin.sees(/Put on another plan/);
    await admin.arrive(pausable.name);
  });

  await test.step('pauses it', async () => {
    await admin.press('Pause');
    await admin.sees(/can read and export everything and change nothing/);
    await admin.press('Pause the shop');
    await admin.sees(/Paused by the platform/);
    await admin.sees('The shop can read and export, and change nothing.');
    await admin.arrive(pausable.name);
  });

  const owner = await visitor(pausable.owner);

  await test.step('the paused shop reads and exports', async () => {
    await owner.goTo('/shop/clients', 'Clients');
    await owner.sees('Alder & Finch Laundries');
    const download = owner.page.waitForEvent('download');
    await owner.press('Export CSV');
    expect((await download).suggestedFilename()).toMatch(/clients.*\.csv$/);
  });

  await test.step('and changes nothing, told so in plain words with what was typed kept', async () => {
    await owner.goTo('/shop/clients/new', 'Add a client');
    await owner.fill('Name', 'Nobody yet');
    await owner.press('Add the client');
    await owner.sees(/The shop is paused/);
    await expect(owner.page.getByLabel('Name', { exact: true })).toHaveValue('Nobody yet');
  });

  await test.step('resumed, it works again', async () => {
    await admin.press('Resume');
    await admin.press('Resume the shop');
    await admin.sees(/Resumed by the platform/);
    await owner.press('Add the client');
    await owner.arrive('Nobody yet');
  });

  await test.step('the admin sees queues, mail, card events and who did what', async () => {
    await admin.open('Queues');
    await admin.open('Mail');
    await admin.open('Card events');
    await admin.open('Plans');
    await admin.sees('Workshop');
    await admin.open('Audit');
    await admin.sees(/Ines Varga/);
  });

  await test.step('the shop sees its plan, its use of it, and its history', async () => {
    await owner.goTo('/shop/subscription', 'Subscription');
    await owner.sees(/Depot/);
  });
});
