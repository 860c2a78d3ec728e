import sharp from 'sharp';
import { fitHinge } from './support/visits';
import { expect, test, worksOffline } from './support/test';
import { type Visitor } from './support/visitor';

const store = 'Lantern Steps';

async function takeCall(office: Visitor, bay: string, symptom: string, words: string) {
  await office.page.goto('/shop/calls/new');
  await office.heading('Take a call');
  await office.page.getByLabel('Which store rings?').pressSequentially(store);
  await office.page.getByRole('option', { name: store }).click();
  await office.page.getByRole('gridcell', { name: bay }).click();
  await office.arrive('Take a call');
  await office.choose('What it does', symptom);
  await office.fill('In the caller’s words', words);
  await office.fill('Who rings', 'Rhea Corbin');
  await office.press('Take the call');
  await office.arrive(new RegExp(`^Call \\d+: ${symptom}$`));
}

interface Found {
  finding: string;
  code: string;
  category: string;
  cause: string;
  action: string;
  minutes: number;
}

async function tickCautions(tech: Visitor): Promise<void> {
  const left = tech.page
    .getByRole('group', { name: 'Before covers come off' })
    .getByRole('checkbox', { checked: false });
  for (let count = await left.count(); count > 0; count--) {
    await left.first().click();
    await expect(left).toHaveCount(count - 1);
  }
  await tech.sees(/Before covers come off: all \d+ ticked/);
}

async function record(tech: Visitor, bay: string, found: Found): Promise<void> {
  await tech.press(`Work on ${bay}`);
  await tech.heading(bay);
  await tickCautions(tech);
  await tech.fill('What you found', found.finding);
  await tech.choose('How it failed', found.code);
  await tech.fill('What failed', found.category);
  await tech.choose(/^Cause$/, found.cause);
  await tech.fill('What you did', found.action);
  await tech.fill('Full cycles', '1');
  await tech.fill('Coins put in', '8');
  await tech.fill('Work', String(found.minutes));
}

async function addPart(tech: Visitor, sought: string, found: RegExp): Promise<void> {
  await tech.press('Add a part');
  await tech.fill('Search the price book', sought);
  await tech.press(found);
  await tech.press('Add the part');
}

test('one visit: a blocked valve, nothing found, and our own mistake', async ({
  visitor,
  works,
}) => {
  await fitHinge(works, store, 'A-05');
  const office = await visitor(works.office);

  await test.step('the office takes two calls and plans a visit for both', async () => {
    await takeCall(office, 'A-02', 'Won’t fill', 'Fills slowly, then stops');
    await takeCall(office, 'A-03', 'Noisy', 'A customer says it rumbles');
    await office.follow('Plan a visit');
    await office.arrive('Plan a visit');
    await office.select('Tech', 'Imre Kovalik');
    await office.tick(/A-02/);
    await office.press('Plan the visit');
    await office.arrive(new RegExp(store));
    await office.sees('Imre Kovalik');
  });
  const visitId = new URL(office.page.url()).pathname.split('/').at(-1) ?? '';

  const tech = await visitor(works.tech, worksOffline);
  await test.step('the tech sees the day and comes to the store', async () => {
    await tech.arrive(/^Today|^Day/);
    await tech.page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
    // There may be other visits to this store today.
    const link = tech.page.getByRole('link', { name: store, exact: true });
    await link.and(tech.page.locator(`[href$="${visitId}"]`)).click();
    await tech.arrive(store);
    await tech.sees(/Floor drain backs up/);
    await tech.press('I am here');
  });

  await test.step('the first machine: a valve blocked with grit', async () => {
    await record(tech, 'A-02', {
      finding: 'Inlet valve blocked with grit',
      code: 'blocked',
      category: 'valve',
      cause: 'supply',
      action: 'Valve fitted, fill timed',
      minutes: 30,
    });
    await addPart(tech, 'inlet valve', /Inlet valve, double/);
    await tech.sees('from the van');
    const chooser = tech.page.waitForEvent('filechooser');
    await tech.press('From the phone');
    await (
      await chooser
    ).setFiles({ name: 'valve.png', mimeType: 'image/png', buffer: await picture() });
    await expect(tech.page.getByRole('button', { name: 'Open photo 1 of A-02' })).toBeVisible();
    await tech.choose('Left as', 'up');
    await tech.arrive('A-02');
    await tech.press('Done with A-02');
    await tech.told('A-02 is put right and left up.');
  });

  await test.step('the second: nothing found, in two taps', async () => {
    await tech.heading(store);
    await tech.press('Nothing found');
    await tech.press('Nothing found on A-03');
    await tech.sees('Nothing found when tested');
  });

  await test.step('the third, without a signal: our own mistake', async () => {
    await tech.page.context().setOffline(true);
    await tech.page.reload();
    await tech.heading(store);
    await tech.told('No signal. What you record is kept here');
    await tech.page.getByRole('gridcell', { name: /^A-05/ }).click();
    await record(tech, 'A-05', {
      finding: 'Door lock burnt, the door hangs crooked',
      code: 'burnt',
      category: 'door',
      cause: 'our own mistake',
      action: 'Door lock fitted, hinge set straight',
      minutes: 35,
    });
    await addPart(tech, 'door lock', /Door lock/);
    await tech.fill('Why', 'We fitted the hinge crooked, the lock took the load.');
    await tech.page
      .getByRole('radio', { name: /A-05: Hinge fitted/ })
      .first()
      .check();
    await tech.choose('Left as', 'up');
    await tech.press('Done with A-05');
    await tech.heading(store);
    await tech.follow('Sign off');
    await tech.arrive('Sign off');
    await tech.fill('Received by (may stay empty)', 'Rhea Corbin');
    await tech.press('Sign off the visit');
    await tech.sees(/\d+ waiting/);
  });

  await test.step('what was entered is sent once there is a signal again', async () => {
    await tech.page.context().setOffline(false);
    await tech.sees('Everything is sent');
    await tech.goTo('/field/outbox', 'Entries of this device');
    await expect(tech.page.getByRole('heading', { name: 'Need you' })).toHaveCount(0);
  });

  const owner = await visitor(works.owner);
  await test.step('the owner reads the reasons and agrees that the shop bears it', async () => {
    await owner.goTo(`/shop/rulings/${visitId}`, new RegExp(store));
    await owner.sees('We fitted the hinge crooked, the lock took the load. (the proposal');
    await owner.sees(/brought about by an earlier job: Hinge fitted and set/);
    await owner.press('Shop bears it');
    await owner.told(/Everything on visit \d+ is settled/);
    await owner.follow('Sign off the ticket');
    await owner.arrive('Sign off the ticket');
    await owner.press(/^Sign off at/);
    await owner.arrive(/^Ticket/);
  });

  await test.step('the ticket shows it at no charge, with what it would have cost', async () => {
    const lock = owner.row(/^\s*Door lock/);
    await expect(lock).toContainText('shop');
    const [list, charged] = [lock.getByText(/\d\.\d\d/).first(), lock.getByText(/\d\.\d\d/).last()];
    await expect(list).toHaveCSS('text-decoration-line', 'line-through');
    await expect(list).not.toHaveText('0.00');
    await expect(charged).toHaveText('0.00');
    await owner.sees(/by the shop, at no charge/i);
  });

  await test.step('and nothing can be added to it any more', async () => {
    await tech.goTo(`/field/visits/${visitId}`, store);
    await tech.sees('Its ticket is signed off: nothing can be added.');
    await expect(tech.page.getByRole('grid')).toHaveCount(0);
    await tech.follow('Won’t fill');
    await tech.heading('A-02');
    await expect(tech.page.getByLabel('What you found')).toBeDisabled();
  });
});

function picture(): Promise<Buffer> {
  const background = { r: 90, g: 110, b: 140 };
  return sharp({ create: { width: 640, height: 480, channels: 3, background } })
    .png()
    .toBuffer();
}
