import { minorDigits } from './currency';
import { exact, safeNumber } from './rounding';

/**
 * The sum of amounts in minor units.
 *
 * @throws RangeError for an amount that is not a safe integer, or a sum past the safe integers
 */
export function addUp(amounts: Iterable<number>): number {
  let total = 0n;
  for (const amount of amounts) total += exact(amount);
  return safeNumber(total);
}

/**
 * An amount as a plain decimal with a point, for CSV cells and input fields: 1250 is `12.50`.
 *
 * @param amount minor units
 */
export function decimalFromAmount(amount: number, currency: string): string {
  const digits = minorDigits(currency);
  const units = exact(amount);
  const text = (units < 0n ? -units : units).toString().padStart(digits + 1, '0');
  const cut = text.length - digits;
  const sign = units < 0n ? '-' : '';
  return digits === 0 ? sign + text : `${sign}${text.slice(0, cut)}.${text.slice(cut)}`;
}

/**
 * The minor units of a plain decimal: `12.5` is 1250. No thousands separators, because `1,250`
 * means two different amounts in two countries.
 *
 * @throws RangeError for other text, more decimals than the currency has, or an amount past the
 *   safe integers
 */
export function amountFromDecimal(text: string, currency: string): number {
  const digits = minorDigits(currency);
  const match = /^(-?)(\d+)(?:\.(\d+))?$/.exec(text.trim());
  const fraction = match?.[3] ?? '';
  if (!match || fraction.length > digits) {
    throw new RangeError(`Not an amount in ${currency}: ${text}`);
  }
  const units = BigInt(`${match[2]}${fraction.padEnd(digits, '0')}`);
  return safeNumber(match[1] ? -units : units);
}

const formats = new Map<string, Intl.NumberFormat>();

/**
 * An amount as people of a language write it, with the currency's sign: `$12.50`, `12,50 €`.
 *
 * @param amount minor units
 * @param locale BCP 47 tag
 * @throws RangeError for an unknown kind of tag or currency
 */
export function formatMoney(amount: number, currency: string, locale: string): string {
  const digits = minorDigits(currency);
  const key = `${locale} ${currency}`;
  let format = formats.get(key);
  if (!format) {
    format = new Intl.NumberFormat(locale, {
      style: 'currency',
      currency,
      currencyDisplay: 'narrowSymbol',
      minimumFractionDigits: digits,
      maximumFractionDigits: digits,
    });
    formats.set(key, format);
  }
  // ES2023 formats decimal text exactly; older typings only know numbers.
  return format.format(decimalFromAmount(amount, currency) as unknown as number);
}
