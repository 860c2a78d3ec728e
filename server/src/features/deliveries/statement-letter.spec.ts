import { buildStatement } from '@lib/domain';
import { statementLetter } from './statement-letter';

function letter(charged: number, storeName = 'Foxglove Lane') {
  const snapshot = buildStatement({
    store: { id: 's', name: storeName },
    period: '2031-05',
    opening: 0,
    tickets: [],
    fees: [
      { id: 'f', date: '2031-05-31', reference: 'M-0001', words: 'Maintenance', charged, tax: 0 },
    ],
    lateCharges: [],
    creditNotes: [],
    payments: [],
    terms: { number: 'S-0142', currency: 'USD', date: '2031-06-01', days: 14 },
  });
  return statementLetter({
    shop: { name: 'Harbour Appliance', phone: '+1 555 0100', locale: 'en-US', currency: 'USD' },
    recipientName: 'Ada Roe',
    subject: 'Statement for May 2031, Foxglove Lane',
    snapshot: { ...snapshot, visits: [] },
    url: 'https://shop.example/client/statements/1',
  });
}

describe('the mail of a statement', () => {
  it('says what is to be paid, by when, and where, in both forms', () => {
    const { text, html } = letter(18_000);
    for (const form of [text, html]) {
      expect(form).toContain('Hello Ada Roe,');
      expect(form).toContain('$180.00, due by Jun 15, 2031');
      expect(form).toContain('https://shop.example/client/statements/1');
      expect(form).toContain('See it and pay');
    }
  });

  it('says that nothing is to be paid', () => {
    expect(letter(0).text).toContain('There is nothing to pay.');
    expect(letter(0).text).not.toContain('and pay');
  });

  it('escapes what people wrote', () => {
    expect(letter(1, 'Foxglove <b>Lane</b>').html).toContain('Foxglove &lt;b&gt;Lane&lt;/b&gt;');
  });
});
