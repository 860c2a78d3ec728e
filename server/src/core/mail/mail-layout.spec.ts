import { layOut, type Letter } from './mail-layout';

const letter: Letter = {
  title: 'Statement for Foxglove Lane',
  greeting: 'Good day, Ada <Client>',
  pieces: [
    { words: 'Two visits & a fee.\nNothing is overdue.' },
    { facts: [['To pay', '$120.00']] },
    {
      table: {
        caption: 'Visits',
        columns: [{ name: 'Day' }, { name: 'Amount', right: true }],
        rows: [
          ['3 April', '$20.00'],
          ['17 April', '$100.00'],
        ],
      },
    },
    { link: { label: 'Open the statement', url: 'https://shop.example/s?a=1&b=2' } },
  ],
  sender: ['Harbour Appliance', '+1 555 0100'],
  why: 'You get this mail as a statement contact.',
};

describe('the common layout of mails', () => {
  it('says the same in both forms', () => {
    const { text, html } = layOut(letter);
    for (const said of ['Visits', '17 April', '$100.00', 'Harbour Appliance', 'To pay']) {
      expect(text).toContain(said);
      expect(html).toContain(said);
    }
    expect(text).toContain('Open the statement:\nhttps://shop.example/s?a=1&b=2');
    expect(text).toContain('3 April    $20.00\n17 April  $100.00');
  });

  it('escapes whatever people typed, and fetches nothing from outside', () => {
    const { html } = layOut(letter);
    expect(html).toContain('Ada &lt;Client&gt;');
    expect(html).toContain('href="https://shop.example/s?a=1&amp;b=2"');
    expect(html).not.toMatch(/<(img|script|link|iframe)|url\(/i);
  });

  it('can be read aloud: a language, a title, headed tables', () => {
    const { html } = layOut({ ...letter, locale: 'en-CA' });
    expect(html).toContain('<html lang="en-CA">');
    expect(html).toContain('<title>Statement for Foxglove Lane</title>');
    expect(html).toMatch(/<th scope="col"/);
    expect(html).toMatch(/<th scope="row"/);
    expect(html).toContain('<caption');
  });
});
