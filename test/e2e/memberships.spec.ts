import { linkIn, mail } from './support/mail';
import { ShopApi } from './support/shop-api';
import { expect, test } from './support/test';

const lindental = 'leopoldine.hrastnik@lindental.example';
const secret = 'seven wet mittens';

/** Makes somebody the owner of a shop's first client; answers with the name of it. */
async function inviteOwner(shopOwner: string, email: string): Promise<string> {
  const shop = await ShopApi.of(shopOwner);
  const { items } = await shop.get<{ items: { id: string; name: string }[] }>('/api/clients');
  const client = items[0];
  if (!client) throw new Error(`The shop of ${shopOwner} has no client.`);
  const name = 'Tilde Amberley';
  await shop.post('/api/invitations', { role: 'client_owner', clientId: client.id, name, email });
  return client.name;
}

test('goes on as another membership, and sees nothing of the one before', async ({
  works,
  visitor,
}) => {
  const email = `tilde.${Date.now().toString(36)}@amberley.example`;
  const tilde = await visitor();
  const main = tilde.page.getByRole('main');

  const first = await inviteOwner(lindental, email);
  const invitation = await mail(email, /invit/i);
  await tilde.goTo(linkIn(invitation, '/invitations'), `Join ${first}`);
  await tilde.fill('Password', secret);
  await tilde.press('Accept');
  await tilde.arrive(first);
  await expect(main).toContainText('Kastanienplatz');

  const second = await inviteOwner(works.owner, email);
  await expect.poll(async () => (await mail(email, /invit/i)).id).not.toBe(invitation.id);
  await tilde.goTo(linkIn(await mail(email, /invit/i), '/invitations'), `Join ${second}`);
  await tilde.press('Accept');
  await tilde.arrive(second);
  await expect(main).not.toContainText('Kastanienplatz');

  await tilde.press('Tilde Amberley');
  await tilde.press(new RegExp(`^${first}`));
  await tilde.arrive(first);
  await expect(main).toContainText('Kastanienplatz');
  await expect(main).toContainText('€');
  await expect(main).not.toContainText('$');

  await tilde.page.reload();
  await tilde.heading(first);
});
