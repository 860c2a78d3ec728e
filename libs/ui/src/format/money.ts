import { amountFromDecimal, decimalFromAmount, formatMoney } from '@lib/domain/money/amount';
import { minorDigits } from '@lib/domain/money/currency';

const formats = new Map<string, Intl.NumberFormat>();

function bareFormat(locale: string, currency: string): Intl.NumberFormat {
  const key = `${locale} ${currency}`;
  let format = formats.get(key);
  if (!format) {
    const digits = minorDigits(currency);
    format = new Intl.NumberFormat(locale, {
      minimumFractionDigits: digits,
      maximumFractionDigits: digits,
    });
    formats.set(key, format);
  }
  return format;
}

/** An amount in minor units as people of `locale` write it; `bare` leaves the currency out. */
export function moneyText(amount: number, currency: string, locale: string, bare = false): string {
  if (!bare) return formatMoney(amount, currency, locale);
  // Formatted from decimal text, so that no binary fraction is ever made of an amount.
  const decimal = decimalFromAmount(amount, currency) as Intl.StringNumericLiteral;
  return bareFormat(locale, currency).format(decimal);
}

/** The currency's sign for the head of a column: "$". */
export function currencySign(currency: string, locale: string): string {
  const parts = new Intl.NumberFormat(locale, {
    style: 'currency',
    currency,
    currencyDisplay: 'narrowSymbol',
  }).formatToParts(0);
  return parts.find((part) => part.type === 'currency')?.value ?? currency;
}

/**
 * What a person typed as an amount, in minor units; undefined when it is not one. Takes a point or a
 * comma as the decimal sign, and no thousands signs, because "1.234" would be two different sums.
 */
export function amountFrom(text: string, currency: string): number | undefined {
  const plain = text.trim().replace(',', '.');
  if (!/^\d{1,10}(\.\d+)?$/.test(plain)) return undefined;
  try {
    return amountFromDecimal(plain, currency);
  } catch {
    // More decimals than the currency has.
    return undefined;
  }
}

/** An amount as it stands in an input field: "12.50". */
export function amountField(amount: number | null | undefined, currency: string): string {
  return amount == null ? '' : decimalFromAmount(amount, currency);
}
