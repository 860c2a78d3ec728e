import { pdfText } from '../../../../test/support/pdf-text';
import { Sheet } from './sheet';

const options = {
  title: 'A sheet',
  author: 'Harbour Appliance',
  lang: 'en-US',
  created: new Date('2031-06-01T00:00:00Z'),
  size: 'A4' as const,
};

function sheetSaying(text: string): Promise<Buffer> {
  const sheet = new Sheet(options);
  sheet.say('P', text);
  return sheet.end(() => 'foot');
}

function sheetOf(rows: number): Promise<Buffer> {
  const sheet = new Sheet(options);
  sheet.say('H1', 'Łódź and Київ', { size: 20, weight: 600 });
  sheet.rule('#3a3f9c');
  const column = { x: sheet.left, width: 120 };
  sheet.table(
    [{ ...column, text: 'Head of the column' }],
    Array.from({ length: rows }, (_, n) => ({
      ruled: n % 2 === 0,
      cells: [{ ...column, text: `row ${n} ${'word '.repeat(8)}${'x'.repeat(60)}` }],
    })),
  );
  return sheet.end((page, pages) => `page ${page} of ${pages}`);
}

describe('a sheet', () => {
  it('gives the same bytes for the same calls', async () => {
    expect((await sheetOf(5)).equals(await sheetOf(5))).toBe(true);
  });

  it('does not depend on the documents set before it', async () => {
    const fresh = async () => {
      jest.resetModules();
      const { Sheet: Unread } = await import('./sheet');
      const sheet = new Unread(options);
      sheet.say('P', 'office, Caf\u00e9');
      return sheet.end(() => 'foot');
    };
    const first = await fresh();
    await sheetSaying('fi ffi 1/2 Cafe\u0301 \u4e2d');
    expect((await sheetSaying('office, Caf\u00e9')).equals(first)).toBe(true);
  });

  it('goes on on further pages, with the head of the table again and nothing lost', async () => {
    const text = pdfText(await sheetOf(60));
    const pages = Number(/page 1 of (\d+)/.exec(text)?.[1]);
    expect(pages).toBeGreaterThan(3);
    expect(text.match(/Head of the column/g)).toHaveLength(pages);
    for (let n = 0; n < 60; n += 1) expect(text).toContain(`row ${n} `);
    expect(text.match(/x/g)?.length).toBe(60 * 60);
  });

  it('sets letters of several scripts', async () => {
    const text = pdfText(await sheetOf(1)).replaceAll('\n', '');
    expect(text).toContain('Łódź and Київ');
  });

  it('is tagged, and says its title and language', async () => {
    const raw = (await sheetOf(1)).toString('latin1');
    const marks = [
      /\/Marked true/,
      /\/S \/H1/,
      /\/S \/Table/,
      /\/S \/TH/,
      /\/S \/TD/,
      /\/Lang \(en-US\)/,
    ];
    expect(marks.filter((mark) => !mark.test(raw))).toEqual([]);
    expect(raw).toMatch(/\/DisplayDocTitle true/);
  });
});
