import sharp from 'sharp';
import { v7 as uuid } from 'uuid';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import {
  buildLaundry,
  buildPerson,
  buildShop,
  buildStore,
  insert,
  next,
  type TestShop,
} from '../support/factories';
import { buildVisitRow } from '../support/tickets';

/** A picture with a place and a camera written into it, lying on its side. */
async function phonePhoto(format: 'jpeg' | 'png' | 'webp' = 'jpeg', width = 600, height = 400) {
  return sharp({ create: { width, height, channels: 3, background: '#b3361f' } })
    .withMetadata({ orientation: 6 })
    .withExifMerge({ IFD0: { Make: 'Norvane Phones' }, IFD3: { GPSLatitudeRef: 'N' } })
    .toFormat(format)
    .toBuffer();
}

describe('photos', () => {
  let server: TestServer;
  let shop: TestShop;
  let tech: ReturnType<typeof api>;
  let laundry: Awaited<ReturnType<typeof buildLaundry>>;

  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());
  beforeEach(async () => {
    shop = await buildShop();
    tech = api(server.app, (await buildPerson(shop, 'tech')).token);
    laundry = await buildLaundry(shop, 1);
  });

  const ofStore = () => ({ ownerKind: 'store', ownerId: laundry.storeId });
  async function job(): Promise<string> {
    const of = { client_id: laundry.clientId, store_id: laundry.storeId };
    const visit_id = await buildVisitRow(shop, of);
    return insert(shop, 'jobs', {
      ...of,
      visit_id,
      machine_id: laundry.machineIds[0],
      position: 1,
    });
  }

  it.each(['jpeg', 'png', 'webp'] as const)(
    'keep a %s upright and free of what a phone adds',
    async (format) => {
      const file = { name: 'Türscharnier.jpg', content: await phonePhoto(format) };
      const added = await tech.call('files.add', {
        file,
        body: { ownerKind: 'job', ownerId: await job() },
      });
      expect(added.status).toBe(201);
      expect(added.body).toMatchObject({
        name: 'Türscharnier.jpg',
        contentType: `image/${format}`,
      });
      const shown = await tech.call('files.show', { params: { fileId: added.body.id } });
      expect(shown.headers).toMatchObject({
        'content-type': `image/${format}`,
        'x-content-type-options': 'nosniff',
        'content-security-policy': "default-src 'none'; sandbox",
        'content-disposition': 'inline',
      });
      const kept = await sharp(shown.body as Buffer).metadata();
      expect([kept.width, kept.height, kept.exif, kept.orientation]).toEqual([
        400,
        600,
        undefined,
        undefined,
      ]);
      expect((shown.body as Buffer).includes('Norvane')).toBe(false);
    },
  );

  it('come in a small size, and large ones are kept no larger than is needed', async () => {
    const file = { name: 'big.jpg', content: await phonePhoto('jpeg', 4000, 3000) };
    const { body } = await tech.call('files.add', { file, body: ofStore() });
    const size = async (query: Record<string, string>) => {
      const shown = await tech.call('files.show', { params: { fileId: body.id }, query });
      const { width, height, format } = await sharp(shown.body as Buffer).metadata();
      return { width, height, format };
    };
    expect(await size({})).toEqual({ width: 1800, height: 2400, format: 'jpeg' });
    expect(await size({ size: 'small' })).toEqual({ width: 240, height: 320, format: 'webp' });
  });

  it('are one photo when a device sends the same again, and never another under its id', async () => {
    const id = uuid();
    const file = { name: 'a.png', content: await phonePhoto('png') };
    const first = await tech.call('files.add', { file, body: { id, ...ofStore() } });
    const again = await tech.call('files.add', { file, body: { id, ...ofStore() } });
    expect([first.body.id, again.body]).toEqual([id, first.body]);
    const other = { name: 'b.png', content: await phonePhoto('png', 50, 50) };
    expect((await tech.call('files.add', { file: other, body: { id, ...ofStore() } })).status).toBe(
      409,
    );
    const list = await tech.call('files.list', { query: ofStore() });
    expect(list.body.items).toHaveLength(1);
  });

  it.each([
    ['a page that calls itself a picture', Buffer.from('<html><script>alert(1)</script></html>')],
    [
      'a drawing with a script',
      Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script/></svg>'),
    ],
    ['half a picture', Buffer.from([0xff, 0xd8, 0xff, 0xe0, 0, 16, 74, 70, 73, 70, 0, 1])],
    ['nothing', Buffer.alloc(0)],
  ])('refuse %s, whatever its name', async (_, content) => {
    const answer = await tech.call('files.add', {
      file: { name: 'x.jpg', content },
      body: ofStore(),
    });
    expect([answer.status, answer.body.errors?.[0].pointer]).toEqual([422, '/file']);
    expect((await tech.call('files.list', { query: ofStore() })).body.items).toEqual([]);
  });

  it('refuse a file that is too large, and a form without a file', async () => {
    const file = { name: 'x.jpg', content: Buffer.alloc(13 * 1024 * 1024, 0xff) };
    expect((await tech.call('files.add', { file, body: ofStore() })).status).toBe(413);
    expect((await tech.call('files.add', { body: ofStore() })).status).toBe(415);
  });

  it('belong to what is there, and are seen by who may see that', async () => {
    const file = { name: 'x.png', content: await phonePhoto('png') };
    const absent = await tech.call('files.add', {
      file,
      body: { ownerKind: 'job', ownerId: uuid() },
    });
    expect(absent.status).toBe(404);

    const { body: proof } = await tech.call('files.add', {
      file,
      body: { ownerKind: 'job', ownerId: await job() },
    });
    const { clientId, storeId } = laundry;
    const sister = await buildStore(shop, { client_id: clientId });
    const stranger = await buildLaundry(shop, 0);
    const as = async (role: 'client_owner' | 'attendant', client: string, store?: string) =>
      api(server.app, (await buildPerson(shop, role, { clientId: client, storeId: store })).token);
    const show = { params: { fileId: proof.id } };
    const owner = await as('client_owner', clientId);
    expect((await owner.call('files.show', show)).status).toBe(200);
    const there = await as('attendant', clientId, storeId);
    expect((await there.call('files.show', show)).status).toBe(200);
    const elsewhere = await as('attendant', clientId, sister);
    expect((await elsewhere.call('files.show', show)).status).toBe(404);
    const other = await as('client_owner', stranger.clientId);
    expect((await other.call('files.show', show)).status).toBe(404);
    expect(
      (await owner.call('files.add', { file, body: { ownerKind: 'job', ownerId: proof.ownerId } }))
        .status,
    ).toBe(403);

    const call = await insert(shop, 'calls', {
      client_id: clientId,
      store_id: storeId,
      number: next(),
      symptom: 'leaks',
      reported_by: 'Abel',
      reported_via: 'client',
    });
    const report = { file, body: { ownerKind: 'call', ownerId: call } };
    expect((await there.call('files.add', report)).status).toBe(201);
    expect((await elsewhere.call('files.add', report)).status).toBe(404);
  });

  it('do not show other files of the shop, such as an imported list', async () => {
    const id = await insert(shop, 'attachments', {
      owner_kind: 'import',
      owner_id: uuid(),
      name: 'prices.csv',
      content_type: 'text/csv',
      bytes: 1,
      sha256: 'a'.repeat(64),
    });
    expect((await tech.call('files.show', { params: { fileId: id } })).status).toBe(404);
  });
});
