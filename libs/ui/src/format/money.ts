const formats = new Map<string, Intl.NumberFormat>();

function formatFor(locale: string, currency: string, bare: boolean): Intl.NumberFormat {
  const key = `${locale} ${currency} ${bare}`;
  let format = formats.get(key);
  if (!format) {
    const digits = minorDigits(currency);
    format = new Intl.NumberFormat(locale, {
      ...(bare ? {} : { style: 'currency', currency, currencyDisplay: 'narrowSymbol' }),
      minimumFractionDigits: digits,
      maximumFractionDigits: digits,
    });
    formats.set(key, format);
  }
  return format;
}

/** How many decimals a currency's minor unit has: 2 for most, 0 for yen, 3 for dinars. */
export function minorDigits(currency: string): number {
  return (
    new Intl.NumberFormat('en', { style: 'currency', currency }).resolvedOptions()
      .maximumFractionDigits ?? 2
  );
}

/** An amount in minor units as people of `locale` write it; `bare` leaves the currency out. */
export function moneyText(amount: number, currency: string, locale: string, bare = false): string {
  const digits = minorDigits(currency);
  // Written as a decimal string, so that no binary fraction is ever made of an amount.
  const whole = Math.trunc(Math.abs(amount) / 10 ** digits);
  const rest = String(Math.abs(amount) % 10 ** digits).padStart(digits, '0');
  const decimal = `${amount < 0 ? '-' : ''}${whole}${digits ? `.${rest}` : ''}`;
  return formatFor(locale, currency, bare).format(decimal as Intl.StringNumericLiteral);
}

/** The currency's sign for the head of a column: "$". */
export function currencySign(currency: string, locale: string): string {
  const parts = formatFor(locale, currency, false).formatToParts(0);
  return parts.find((part) => part.type === 'currency')?.value ?? currency;
}

/**
 * What a person typed as an amount, in minor units; undefined when it is not one. Takes a point or a
 * comma as the decimal sign, and no thousands signs, because "1.234" would be two different sums.
 */
export function amountFrom(text: string, currency: string): number | undefined {
  const digits = minorDigits(currency);
  const match = /^\s*(\d{1,10})(?:[.,](\d+))?\s*$/.exec(text);
  if (!match) return undefined;
  const fraction = match[2] ?? '';
  if (fraction.length > digits) return undefined;
  return Number(match[1] + fraction.padEnd(digits, '0'));
}
