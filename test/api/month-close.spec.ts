import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { canonicalJson } from '@lib/domain';
import { type Mailbox } from '../../infra/fakes/mailbox/mailbox';
import { rows } from '../../server/src/core/database/tenancy';
import { api } from '../support/api';
import { type TestServer } from '../support/app';
import {
  buildPerson,
  buildShop,
  insert,
  inShop,
  type TestPerson,
  type TestShop,
} from '../support/factories';
import {
  bookTroubles,
  buildPayingStore,
  buildSignedOff,
  closedMonths,
  type MoneyStore,
  workClose,
} from '../support/money';
import { pdfText } from '../support/pdf-text';
import { setUpMailServer } from '../support/set-ups';

const { last, before, lastDay } = closedMonths();

describe('closing a month', () => {
  let server: TestServer;
  let mailbox: Mailbox;
  let shop: TestShop;
  let office: TestPerson;
  let store: MoneyStore;
  let quiet: MoneyStore;
  setUpMailServer((made) => ({ server, mailbox } = made));
  beforeAll(async () => {
    shop = await buildShop({ name: 'Harbour Appliance' });
    office = await buildPerson(shop, 'office');
    store = await buildPayingStore(shop, { email: 'ada@laundry.example' });
    quiet = await buildPayingStore(shop);
    await buildSignedOff(shop, store, { on: `${before}-20`, net: 10_000 });
    await buildSignedOff(shop, store, {
      on: `${last}-05`,
      net: 38_140,
      tax: 3_147,
      borneByShop: 17_100,
    });
  });
  const asOffice = () => api(server.app, office.token);

  it('shows beforehand what each store would be told, and what is unfinished', async () => {
    const visitId = await insert(shop, 'visits', {
      client_id: quiet.clientId,
      store_id: quiet.storeId,
      number: 900,
      planned_on: lastDay,
      state: 'completed',
    });
    const { status, body } = await asOffice().call('statements.closePreview', {
      query: { month: last },
    });
    expect(status).toBe(200);
    expect(body).toMatchObject({
      month: last,
      mayClose: true,
      run: null,
      totals: { stores: 2, visits: 2, charged: 48_140, tax: 3_147, closing: 51_287 },
      unfinished: {
        visits: { count: 1, items: [{ visitId, storeId: quiet.storeId }] },
        withoutRecipient: { count: 0 },
      },
    });
    const row = body.stores.find((s: { storeId: string }) => s.storeId === store.storeId);
    expect(row).toMatchObject({ visits: 2, opening: 0, borneByShop: 17_100, recipients: 1 });
  });

  let runId: string;
  it('begins once, whoever presses the button again', async () => {
    const first = await asOffice().call('statements.close', { body: { month: last } });
    expect(first.status).toBe(201);
    expect(first.body).toMatchObject({ state: 'building', stores: 2, counts: { waiting: 2 } });
    runId = first.body.id as string;
    const again = await asOffice().call('statements.close', { body: { month: last } });
    expect(again.status).toBe(409);
    const early = await asOffice().call('statements.close', { body: { month: '2999-01' } });
    expect(early.status).toBe(422);
  });

  it('can be held and gone on with', async () => {
    const held = await asOffice().call('statements.hold', { params: { runId } });
    expect(held.body.state).toBe('held');
    await workClose(server);
    const still = await asOffice().call('statements.run', { params: { runId } });
    expect(still.body).toMatchObject({ state: 'held', counts: { waiting: 2 } });
    const on = await asOffice().call('statements.goOn', { params: { runId } });
    expect(on.body.state).toBe('building');
  });

  it('builds, renders and mails one statement a store', async () => {
    await workClose(server);
    const { body } = await asOffice().call('statements.run', { params: { runId } });
    expect(body).toMatchObject({
      state: 'done',
      progress: 1,
      counts: { waiting: 0, built: 0, rendered: 2, failed: 0 },
      mails: { waiting: 0, sent: 2, uncertain: 0, failed: 0, total: 2 },
      firstChecked: { statements: 2 },
      total: 51_287,
    });
    expect(body.firstChecked.agree).toBe(body.firstChecked.checks);
    expect(body.firstChecked.checks).toBeGreaterThan(20);
    expect(await bookTroubles(shop)).toEqual([]);
    const list = await asOffice().call('statements.list', { query: { month: last } });
    expect(list.body.items.map((s: { number: number }) => s.number).sort()).toEqual([1, 2]);
  });

  let statementId: string;
  it('states the visits in plain words, with what the shop bore', async () => {
    const clientOwner = await buildPerson(shop, 'client_owner', { clientId: store.clientId });
    const asClient = api(server.app, clientOwner.token);
    const { body: list } = await asClient.call('statements.list');
    expect(list.items).toHaveLength(1);
    statementId = list.items[0].id as string;
    const { body } = await asClient.call('statements.show', { params: { statementId } });
    expect(body).toMatchObject({
      name: expect.stringMatching(/^S-000[12]$/),
      month: last,
      charged: 48_140,
      tax: 3_147,
      closing: 51_287,
      toPay: 51_287,
      borneByShop: 17_100,
      state: 'open',
      deliveries: [],
    });
    expect(body.checks.every((check: { holds: boolean }) => check.holds)).toBe(true);
    const visit = body.visits[1];
    expect(visit.words).toMatch(/^Put right: A-\d+\.$/);
    expect(visit.jobs[0]).toMatchObject({
      found: 'Inlet valve blocked',
      done: 'Fitted a new valve',
      borneByShop: 17_100,
      lines: [
        { description: 'Labour', bearer: 'store', charged: 38_140 },
        { description: 'Door lock', bearer: 'shop', list: 17_100, charged: 0 },
      ],
    });
  });

  it('shows the statement to nobody of another client', async () => {
    const stranger = await buildPerson(shop, 'client_owner', { clientId: quiet.clientId });
    for (const id of ['statements.show', 'statements.pdf'] as const) {
      const answer = await api(server.app, stranger.token).call(id, { params: { statementId } });
      expect(answer.status).toBe(404);
    }
  });

  it('mails the PDF to the contact, in text and HTML, under one Message-ID', async () => {
    const letters = mailbox.letters.list({ to: 'ada@laundry.example' });
    expect(letters).toHaveLength(1);
    const letter = await mailbox.letters.open(letters[0]!.id);
    expect(letter).toMatchObject({
      messageId: `<statement.${statementId}.${store.contactId}@tumblewright.example>`,
      attachments: [{ name: expect.stringMatching(/^statement-000[12]\.pdf$/) }],
    });
    expect(letter?.headers.from).toContain('Harbour Appliance');
    expect(letter?.text).toContain('$512.87');
    expect(letter?.html).toContain('$512.87');
    expect(letter?.text).toContain(`/client/statements/${statementId}`);
  });

  it('renders a tagged PDF in Rubik that says what the statement says', async () => {
    const answer = await asOffice().call('statements.pdf', { params: { statementId } });
    expect(answer.headers['content-type']).toBe('application/pdf');
    const pdf = answer.body as Buffer;
    expect(pdf.subarray(0, 8).toString('latin1')).toBe('%PDF-1.7');
    const raw = pdf.toString('latin1');
    const tagged = [
      /\/Marked true/,
      /\/StructTreeRoot /,
      /\/Lang \(en-US\)/,
      /\/BaseFont \/[A-Z]{6}\+Rubik/,
    ];
    expect(tagged.filter((mark) => !mark.test(raw))).toEqual([]);
    const text = pdfText(pdf);
    for (const words of [
      'Harbour Appliance',
      '$512.87 to pay by',
      '171.00',
      'Inlet valve blocked',
    ]) {
      expect(text).toContain(words);
    }
  });

  it('makes a PDF that other programs read, where they are installed', async () => {
    const answer = await asOffice().call('statements.pdf', { params: { statementId } });
    const folder = mkdtempSync(join(tmpdir(), 'tumblewright-pdf-'));
    const file = join(folder, 'statement.pdf');
    writeFileSync(file, answer.body as Buffer);
    const says = (program: string, args: string[]): string | undefined => {
      try {
        return execFileSync(program, args, { encoding: 'utf8' });
      } catch (error) {
        if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
        throw error;
      }
    };
    try {
      const checked = says('qpdf', ['--check', file]);
      if (checked !== undefined) expect(checked).toContain('No syntax or stream encoding errors');
      const read = says('pdftotext', ['-layout', file, '-']);
      if (read !== undefined) expect(read).toContain('$512.87 to pay by');
      // Whatever is installed: our own reading of the file finds the same figure.
      expect(pdfText(answer.body as Buffer)).toContain('$512.87 to pay by');
    } finally {
      rmSync(folder, { recursive: true, force: true });
    }
  });

  it('keeps the snapshot under the hash of its canonical text, and lets nobody change it', async () => {
    const [kept] = await inShop(shop, () =>
      rows<{ snapshot: unknown; sha256: string }>(
        'select snapshot, sha256 from statements where shop_id = $shopId and id = $statementId',
        { shopId: shop.id, statementId },
      ),
    );
    const text = canonicalJson(kept?.snapshot);
    expect(createHash('sha256').update(text).digest('hex')).toBe(kept?.sha256);
    await expect(
      inShop(shop, () =>
        rows('update statements set number = 9 where shop_id = $shopId', { shopId: shop.id }),
      ),
    ).rejects.toThrow(/permission denied/);
  });

  it('mails a contact who is added later, once', async () => {
    await insert(shop, 'contacts', {
      client_id: store.clientId,
      name: 'Ben Poe',
      email: 'ben@laundry.example',
      gets_statements: true,
    });
    const ask = () => asOffice().call('statements.mail', { params: { statementId } });
    expect((await ask()).body).toEqual({ added: 1 });
    expect((await ask()).body).toEqual({ added: 0 });
    await workClose(server);
    expect(mailbox.letters.list({ to: 'ben@laundry.example' })).toHaveLength(1);
    expect(mailbox.letters.list({ to: 'ada@laundry.example' })).toHaveLength(1);
  });
});
