import { consequenceWords } from './close-words';
import { type Preview } from './month-close-api';

const none = { count: 0, items: [] };
const totals = { stores: 8, visits: 21, opening: 0, charged: 287_010, tax: 0 };
const preview = {
  stores: [{ recipients: 2 }, { recipients: 1 }],
  totals: { ...totals, borneByShop: 0, paid: 0, closing: 0 },
  unfinished: { visits: none, rulings: none, withoutRecipient: none },
} as unknown as Preview;
const money = (amount: number) => `$${(amount / 100).toFixed(2)}`;

describe('consequenceWords', () => {
  it('says how many, how much, and to how many', () => {
    expect(consequenceWords(preview, money)).toBe(
      '8 statements over $2870.10 of new charges are numbered, posted and mailed, 3 mails in all. ' +
        'A statement that was made cannot be taken back.',
    );
  });

  it('says what is left out', () => {
    const unfinished = {
      visits: { count: 2, items: [] },
      rulings: none,
      withoutRecipient: { count: 1, items: [] },
    };
    expect(consequenceWords({ ...preview, unfinished }, money)).toContain(
      '2 visits not signed off will stand on a later one; for 1 store nobody gets it by mail.',
    );
  });
});
