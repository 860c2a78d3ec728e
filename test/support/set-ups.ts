import { type Mailbox, startMailbox } from '../../infra/fakes/mailbox/mailbox';
import { api } from './api';
import { startTestServer, type TestServer } from './app';
import { buildPerson, buildShop, type TestShop } from './factories';

/** Somebody who calls operations; see `api`. */
export type Caller = ReturnType<typeof api>;

/**
 * One server for the tests of a `describe`, and for each of them a fresh shop with somebody in its
 * office: `setUpOffice((made) => ({ server, shop, office } = made))`.
 */
export function setUpOffice(
  take: (made: { server: TestServer; shop: TestShop; office: Caller }) => void,
): void {
  let server: TestServer;
  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());
  beforeEach(async () => {
    const shop = await buildShop();
    const { token } = await buildPerson(shop, 'office');
    take({ server, shop, office: api(server.app, token) });
  });
}

/** One server for the tests of a `describe`, whose mails land in a mailbox of their own. */
export function setUpMailServer(
  take: (made: { server: TestServer; mailbox: Mailbox }) => void,
): void {
  let server: TestServer;
  let mailbox: Mailbox;
  beforeAll(async () => {
    mailbox = await startMailbox();
    server = await startTestServer({ SMTP_URL: mailbox.smtpUrl });
    take({ server, mailbox });
  });
  afterAll(async () => {
    await server.close();
    await mailbox.close();
  });
}
