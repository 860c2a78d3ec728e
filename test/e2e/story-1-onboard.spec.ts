import { linkIn, mail } from './support/mail';
import { expect, test } from './support/test';

const secret = 'seven wet mittens';

const machineHeader = 'Store number;Bay;Kind;Energy;Make;Model;Serial number;Vend price';

function csv(name: string, ...lines: string[]) {
  const text = [machineHeader, ...lines, ''].join('\r\n');
  return { name, mimeType: 'text/csv', buffer: Buffer.from(text) };
}

test('a newcomer opens a shop, fills it and lets its people in', async ({ visitor }, info) => {
  // Each run has its own, so that it can be repeated against an application that stays up.
  const tag = `${info.project.name}-${Date.now().toString(36)}`;
  const shop = `Thistle Fork Repairs ${tag}`;
  const address = (name: string) => `${name}.${tag}@thistle.example`;
  const hester = await visitor();

  await test.step('signs up and follows the mailed link', async () => {
    await hester.goTo('/sign-in', 'Sign in');
    await hester.follow('Open a shop');
    await hester.arrive('Open a shop');
    await hester.fill('Name of the shop', shop);
    await hester.fill('Your name', 'Hester Quillfeather');
    await hester.fill('E-mail address', address('hester'));
    await hester.fill('Password', secret);
    await hester.select('Time zone of the shop', 'America/Denver');
    await hester.page.getByLabel('Currency of your statements').selectOption('CAD');
    await hester.press('Open the shop');
    await hester.arrive('Look into your mail');

    const letter = await mail(address('hester'), /./);
    await hester.goTo(linkIn(letter, '/verify-email'), 'Your address is confirmed');
    await hester.follow('Sign in');
    await hester.signIn(address('hester'), secret);
    await hester.arrive('Today');
    await hester.sees('Your shop is not set up yet.');
  });

  await test.step('says who the shop is, its terms, clock and currency', async () => {
    await hester.follow('Open the set-up guide');
    await hester.arrive('Set up the shop');
    await hester.follow('Open the settings');
    await hester.arrive('Settings');
    await expect(hester.page.getByLabel('Currency', { exact: true })).toHaveValue('CAD');
    await hester.fill('Address', '5 Thistle Fork\nLarkmoor');
    await hester.fill('Telephone', '+1 555 0177');
    await hester.press('Save the shop’s data');
    await hester.told(/is written like this on everything/);
    await hester.fill('Days to pay', '14');
    await hester.press('Save the terms');
    await hester.told('Each month is closed by itself on day 1 of the next.');
    await hester.select('Time zone', 'America/Halifax');
    await hester.press('Save clock and writing');
    await hester.told('Times are on the clock of America/Halifax from now on.');
  });

  await test.step('writes the first price book of its own', async () => {
    await hester.open('Price book');
    await hester.follow('Write a new edition');
    await hester.arrive('New edition');
    await hester.fill('An hour of work', '96.00');
    await hester.fill('Note', 'Our own rates');
    await hester.press('Put the edition in force');
    await hester.arrive('Edition 2');
    await hester.sees('Our own rates');
    await hester.sees(/96\.00/);
  });

  await test.step('adds a client, its store, who gets statements, and a bank of machines', async () => {
    await hester.open('Clients');
    await hester.follow('Add a client');
    await hester.arrive('Add a client');
    await hester.fill('Name', 'Pendle Suds');
    await hester.press('Add the client');
    await hester.arrive('Pendle Suds');
    await hester.follow('Add a store');
    await hester.arrive('Add a store');
    await hester.fill('Name', 'Coble Row');
    await hester.fill('Number', 'S-100');
    await hester.fill('Address', '40 Coble Row\nLarkmoor');
    await hester.fill('How to get in', 'Key behind the changer.');
    await hester.press('Add the store');
    await hester.arrive('Coble Row');

    await hester.press('Add a contact');
    await hester.fill('Name', 'Ada Pendle');
    await hester.fill('E-mail address', address('ada'));
    await hester.tick('Gets the statements');
    await hester.press('Add the contact');
    await hester.told('Ada Pendle gets statements.');

    await hester.follow('Add a bank of machines');
    await hester.arrive('Add several machines');
    await hester.fill('Letter of the bank', 'A');
    await hester.fill('First bay', '1');
    await hester.fill('Last bay', '4');
    await hester.select('Kind', 'Top loader');
    await hester.choose('Heated or driven by', 'Electric');
    await hester.fill('Make', 'Norvane');
    await hester.fill('Model', 'TL-40');
    await hester.press('Add 4 machines');
    await hester.arrive('Coble Row');
    await expect(hester.page.getByRole('gridcell')).toHaveCount(4);
  });

  await test.step('sends a file with a bad row, then the corrected one', async () => {
    const good = 'S-100;A-05;Top loader;Electric;Norvane;TL-40;NV-5;3.25';
    await hester.goTo('/shop/imports', 'Import');
    await hester.choose('What the file holds', 'Machines');
    await hester.page
      .getByLabel('The file')
      .setInputFiles(
        csv('machines.csv', good, 'S-100;A-06;Tumbrel;Electric;Norvane;TL-40;NV-6;3.25'),
      );
    await hester.press('Check the file');
    await hester.arrive('machines.csv');
    await hester.sees(/1 row to put right before anything can be applied/);
    const bad = hester.row('A-06');
    await expect(bad.getByRole('cell').first()).toHaveText('3');
    await expect(bad).toContainText('Kind');
    await expect(hester.page.getByRole('button', { name: 'Apply all rows' })).toHaveCount(0);

    await hester.follow('Send the file again');
    await hester.heading('Import');
    await hester.choose('What the file holds', 'Machines');
    await hester.page
      .getByLabel('The file')
      .setInputFiles(csv('corrected.csv', good, 'S-100;A-06;Dryer;Gas;Quillon;Dry 30;QD-6;0.50'));
    await hester.press('Check the file');
    await hester.arrive('corrected.csv');
    await hester.press('Apply all rows');
    await hester.agree('Apply corrected.csv?', 'Apply all rows');
    await hester.sees(/All of it was applied/);
    await hester.follow('See the machines');
    await hester.arrive('Machines');
    await hester.sees('6 machines');
  });

  await test.step('invites the owner of the client, and a tech', async () => {
    await hester.open('Clients');
    await hester.follow('Pendle Suds');
    await hester.heading('Pendle Suds');
    await hester.press('Invite somebody');
    await hester.choose('As', /Owner:/);
    await hester.fill('Name', 'Ada Pendle');
    await hester.fill('E-mail address', address('ada'));
    await hester.press('Mail the invitation');
    await hester.told(address('ada'));

    await hester.open('Crew');
    await hester.follow('Invite somebody');
    await hester.arrive('Invite somebody');
    await hester.choose('As', /Tech:/);
    await hester.fill('Name', 'Jory Tamblyn');
    await hester.fill('E-mail address', address('jory'));
    await hester.press('Mail the invitation');
    await hester.told(`${address('jory')} was invited as tech.`);
  });

  await test.step('both accept and land where they work', async () => {
    for (const [name, joins, lands] of [
      ['ada', 'Join Pendle Suds', /\/client/],
      ['jory', `Join ${shop}`, /\/field/],
    ] as const) {
      const invited = await visitor();
      const letter = await mail(address(name), /invit/i);
      await invited.goTo(linkIn(letter, '/invitations'), joins);
      await invited.fill('Password', secret);
      await invited.press('Accept');
      await expect(invited.page).toHaveURL(lands);
      await invited.told('You have joined');
      await invited.arrive(/./);
    }
  });
});
