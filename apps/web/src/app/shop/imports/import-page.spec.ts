import { AnsweringApi, onePage } from '../../testing/answering-api';
import { PageUnderTest } from '../../testing/page';
import { type Import } from './imports-api';
import { ImportPage } from './import-page';

const sent: Import = {
  id: 'i1',
  kind: 'stores',
  fileName: 'stores.csv',
  state: 'checked',
  rowsTotal: 15,
  rowsDone: 15,
  counts: { new: 12, changed: 3, unchanged: 0, bad: 0 },
  problem: null,
  createdAt: '2031-05-06T10:00:00Z',
  version: 3,
};
const badRow = {
  row: 7,
  outcome: 'bad',
  label: 'S-901 Wren Two',
  errors: [{ column: 'Statement e-mail', detail: 'is not an address' }],
  changes: [],
};

async function opened(facts: Partial<Import>, rows: readonly object[] = []) {
  const api = AnsweringApi.provide({
    'imports.show': { ...sent, ...facts },
    'imports.rows': onePage(rows),
  });
  return { api, page: await PageUnderTest.open(ImportPage, 'imports/:importId', '/imports/i1') };
}

describe('ImportPage', () => {
  it('shows how far the check is, and no rows before all were checked', async () => {
    const { api, page } = await opened({ state: 'checking', rowsDone: 5 });
    expect(page.text).toContain('5 of 15 checked');
    expect(page.text).toContain('it goes on by itself');
    expect(api.sent('imports.rows')).toHaveLength(0);
  });

  it('says that a file is being read before its rows are counted', async () => {
    const { page } = await opened({ state: 'waiting', rowsTotal: 0, rowsDone: 0 });
    expect(page.text).toContain('The file is being read.');
    expect(page.text).not.toContain('0 of 0');
  });

  it('offers to apply all rows once every row is good', async () => {
    const { page } = await opened({});
    expect(page.text).toContain('Applying it makes 12 new stores, 3 changed.');
    expect(page.text).toContain('Apply all rows');
  });

  it('shows the bad rows first, column by column, and offers nothing to apply', async () => {
    const counts = { new: 12, changed: 2, unchanged: 0, bad: 1 };
    const { api, page } = await opened({ counts }, [badRow]);
    expect(api.sent('imports.rows').at(-1)?.query).toMatchObject({ outcome: 'bad' });
    expect(page.text).toContain('There is 1 row to put right');
    expect(page.text).toContain('Statement e-mail is not an address');
    expect(page.text).not.toContain('Apply all rows');
  });

  it('says so when nothing in the file is new', async () => {
    const counts = { new: 0, changed: 0, unchanged: 15, bad: 0 };
    const { page } = await opened({ counts });
    expect(page.text).toContain('Everything in the file stands like that already.');
    expect(page.text).not.toContain('Apply all rows');
  });

  it('says why a file could not be read', async () => {
    const { page } = await opened({ state: 'failed', problem: 'The column "Store" is missing.' });
    expect(page.text).toContain('The column "Store" is missing. Nothing was changed.');
  });
});
