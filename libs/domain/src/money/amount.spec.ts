import fc from 'fast-check';
import { addUp, amountFromDecimal, decimalFromAmount, formatMoney } from './amount';
import { minorDigits } from './currency';

describe('amounts', () => {
  it.each([
    [1250, 'USD', '12.50'],
    [-5, 'EUR', '-0.05'],
    [1250, 'JPY', '1250'],
    [1250, 'KWD', '1.250'],
    [0, 'USD', '0.00'],
    [Number.MAX_SAFE_INTEGER, 'USD', '90071992547409.91'],
  ])('%d of %s is written %s', (amount, currency, text) => {
    expect(decimalFromAmount(amount, currency)).toBe(text);
    expect(amountFromDecimal(text, currency)).toBe(amount);
  });

  it('reads fewer decimals than the currency has', () => {
    expect(amountFromDecimal('12.5', 'USD')).toBe(1250);
    expect(amountFromDecimal(' 12 ', 'USD')).toBe(1200);
  });

  it.each(['12.505', '1,250.00', '', '.5', '1e3', '--1', '12 50', '99999999999999999'])(
    'refuses %p',
    (text) => {
      expect(() => amountFromDecimal(text, 'USD')).toThrow(RangeError);
    },
  );

  it('reads back what it writes', () => {
    fc.assert(
      fc.property(fc.maxSafeInteger(), fc.constantFrom('USD', 'JPY', 'KWD'), (amount, currency) => {
        expect(amountFromDecimal(decimalFromAmount(amount, currency), currency)).toBe(amount);
      }),
    );
  });

  it('adds without losing a unit, or refuses', () => {
    expect(addUp([1, -2, 3])).toBe(2);
    expect(addUp([])).toBe(0);
    expect(() => addUp([Number.MAX_SAFE_INTEGER, 1])).toThrow(RangeError);
    expect(() => addUp([0.1])).toThrow(RangeError);
  });

  it('formats as the language does, with the decimals of ISO 4217', () => {
    expect(formatMoney(123456, 'USD', 'en-US')).toBe('$1,234.56');
    expect(formatMoney(-123456, 'EUR', 'de-DE').replace(/\s/g, ' ')).toBe('-1.234,56 €');
    expect(formatMoney(1234, 'JPY', 'en-US')).toBe('¥1,234');
    expect(formatMoney(123456, 'HUF', 'en-US')).toContain('1,234.56');
    expect(formatMoney(Number.MAX_SAFE_INTEGER, 'USD', 'en-US')).toBe('$90,071,992,547,409.91');
  });

  it('knows currency codes by their shape', () => {
    expect(() => minorDigits('usd')).toThrow(RangeError);
    expect(minorDigits('COP')).toBe(2);
  });
});
