import { LocalKeepings } from './leaving';
import { unsent } from './unsent';

describe('signing out of a device', () => {
  afterEach(() => unsent.forget());

  it('names what would be lost, of every membership', async () => {
    const keepings = new LocalKeepings();
    expect(await keepings.losses()).toEqual([]);
    unsent.note('as a tech', 3);
    unsent.note('as the owner', 1);
    expect(await keepings.losses()).toEqual([
      '4 entries on this device have not been sent and would be lost.',
    ]);
    unsent.note('as a tech', 0);
    expect(await keepings.losses()).toEqual([
      '1 entry on this device has not been sent and would be lost.',
    ]);
  });

  it('wipes what areas keep, and forgets the counts', async () => {
    const keepings = new LocalKeepings();
    const wipe = jest.fn(() => Promise.resolve());
    keepings.add({ wouldLose: () => Promise.resolve('2 drafts'), wipe });
    unsent.note('as a tech', 3);
    expect(await keepings.losses()).toHaveLength(2);
    await keepings.wipe();
    expect(wipe).toHaveBeenCalledTimes(1);
    expect(unsent.count()).toBe(0);
  });
});
