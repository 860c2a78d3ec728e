import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildPerson, buildShop, type TestPerson, type TestShop } from '../support/factories';

describe('the crew', () => {
  let server: TestServer;
  let shop: TestShop;
  let owner: TestPerson;
  let tech: TestPerson;

  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());
  beforeEach(async () => {
    shop = await buildShop();
    owner = await buildPerson(shop, 'shop_owner', { name: 'Olive Owner' });
    tech = await buildPerson(shop, 'tech', { name: 'Tim Tech' });
  });

  const by = (person: TestPerson) => api(server.app, person.token);
  const show = async (person: TestPerson) =>
    (await by(owner).call('crew.show', { params: { membershipId: person.membershipId } })).body;
  const change = (person: TestPerson, version: number, body: object, who = owner) =>
    by(who).call('crew.change', { params: { membershipId: person.membershipId }, version, body });

  it('is listed by name, with what a colleague costs for owners only', async () => {
    const { version } = await show(tech);
    const changed = await change(tech, version, { van: 'Van 2', costPerHour: 3100 });
    expect(changed.status).toBe(200);
    const seen = async (person: TestPerson) =>
      (await by(person).call('crew.list')).body.items.map(
        (m: { name: string; costPerHour: number | null; van: string }) => [
          m.name,
          m.van,
          m.costPerHour,
        ],
      );
    expect(await seen(owner)).toEqual([
      ['Olive Owner', '', 0],
      ['Tim Tech', 'Van 2', 3100],
    ]);
    expect(await seen(tech)).toEqual([
      ['Olive Owner', '', null],
      ['Tim Tech', 'Van 2', null],
    ]);
  });

  it('changes roles, unless somebody changed the person meanwhile', async () => {
    const { version } = await show(tech);
    expect((await change(tech, version, { role: 'office' })).body.role).toBe('office');
    expect((await change(tech, version, { role: 'tech' })).status).toBe(412);
    expect((await change(tech, version + 1, { initials: 'TiT' })).body.initials).toBe('TiT');
  });

  it('always has an owner, also when two leave at once', async () => {
    const params = { membershipId: owner.membershipId };
    const { version } = await show(owner);
    expect((await by(owner).call('crew.end', { params, version })).status).toBe(409);
    expect((await change(owner, version, { role: 'tech' })).status).toBe(409);
    const second = await buildPerson(shop, 'shop_owner');
    const leave = (person: TestPerson) =>
      by(owner).call('crew.end', { params: { membershipId: person.membershipId }, version: 1 });
    const statuses = (await Promise.all([leave(owner), leave(second)])).map((a) => a.status);
    expect(statuses.sort()).toEqual([200, 409]);
  });

  it('lets people leave, keeps them in the record, and counts them no more', async () => {
    const { version } = await show(tech);
    const params = { membershipId: tech.membershipId };
    const ended = await by(owner).call('crew.end', { params, version });
    expect(ended.body.endedAt).not.toBeNull();
    expect((await by(owner).call('crew.end', { params, version })).status).toBe(200);
    const names = async (show: string) =>
      (await by(owner).call('crew.list', { query: { show } })).body.items.map(
        (m: { name: string }) => m.name,
      );
    expect(await names('current')).toEqual(['Olive Owner']);
    expect(await names('ended')).toEqual(['Tim Tech']);
    expect((await change(tech, ended.body.version, { van: 'Van 3' })).status).toBe(409);
  });

  it('is managed by owners only', async () => {
    const office = await buildPerson(shop, 'office');
    const { version } = await show(tech);
    expect((await change(tech, version, { van: 'Mine' }, office)).status).toBe(403);
    expect((await change(tech, version, { van: 'Mine' }, tech)).status).toBe(403);
  });
});
