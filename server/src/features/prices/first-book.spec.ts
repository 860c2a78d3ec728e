import { type PriceBook, priceBook } from '@lib/contracts';
import { type Edition, type TaxRate, type WarrantyRules } from '@lib/domain';
import { firstBook } from './first-book';

describe('the price book a shop starts with', () => {
  it.each(['USD', 'EUR', 'JPY', 'KRW', 'KWD', 'SEK', 'VND'])('is whole in %s', (currency) => {
    expect(priceBook.parse(firstBook(currency))).toEqual(firstBook(currency));
  });

  it('speaks in the minor units of the currency', () => {
    expect(firstBook('USD').labour.normalPerHour).toBe(95_00);
    expect(firstBook('JPY').labour.normalPerHour).toBe(14_250);
    expect(firstBook('KWD').labour.normalPerHour).toBe(95_000);
  });

  it('charges more after hours, and less markup the dearer the part', () => {
    const book = firstBook('EUR');
    expect(book.labour.afterHoursPerHour).toBeGreaterThan(book.labour.normalPerHour);
    const rates = book.markup.bands.map((band) => band.basisPoints);
    expect(rates).toEqual([...rates].sort((a, b) => b - a));
  });

  it('is what the computation takes', () => {
    const book: PriceBook = firstBook('USD');
    const edition: Edition = book;
    const warranty: WarrantyRules = book.warranty;
    const taxes: readonly TaxRate[] = book.taxes.rates;
    expect([edition.trips.length, warranty.labourDays, taxes.length]).toEqual([1, 30, 0]);
  });
});
