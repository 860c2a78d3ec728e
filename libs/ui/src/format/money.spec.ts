import { amountField, amountFrom, currencySign, moneyText } from './money';

describe('money text', () => {
  it('writes minor units with the decimals of the currency', () => {
    expect(moneyText(14820, 'USD', 'en-US')).toBe('$148.20');
    expect(moneyText(14820, 'JPY', 'en-US')).toBe('¥14,820');
    expect(moneyText(14820, 'KWD', 'en-US', true)).toBe('14.820');
    expect(moneyText(14820, 'HUF', 'en-US', true)).toBe('148.20');
    expect(moneyText(-5, 'USD', 'en-US')).toBe('-$0.05');
    expect(moneyText(123456, 'EUR', 'de-DE', true)).toBe('1.234,56');
  });

  it('does not lose a cent of the largest exact amount', () => {
    expect(moneyText(Number.MAX_SAFE_INTEGER, 'USD', 'en-US')).toBe('$90,071,992,547,409.91');
  });

  it('gives the sign for a column head', () => {
    expect(currencySign('GBP', 'en-GB')).toBe('£');
  });

  it.each([
    ['12', 1200],
    ['12.5', 1250],
    [' 12,50 ', 1250],
    ['0.07', 7],
    ['12.345', undefined],
    ['1,234.00', undefined],
    ['-1', undefined],
    ['', undefined],
    ['twelve', undefined],
  ])('reads "%s" as %s', (text, amount) => {
    expect(amountFrom(text, 'USD')).toBe(amount);
  });

  it('gives back what was typed', () => {
    expect(amountField(1250, 'USD')).toBe('12.50');
    expect(amountField(null, 'USD')).toBe('');
  });
});
