/**
 * Minor digits of the currencies in ISO 4217 list one that do not have two. Kept here rather than
 * asked of `Intl`, whose data follows custom instead of the standard for some currencies (no
 * decimals for COP, HUF or PKR) and differs between browsers: a stored amount must mean the same
 * everywhere.
 */
const exceptions: ReadonlyMap<string, number> = new Map([
  ...'BIF CLP DJF GNF ISK JPY KMF KRW PYG RWF UGX UYI VND VUV XAF XOF XPF'
    .split(' ')
    .map((code) => [code, 0] as const),
  ...'BHD IQD JOD KWD LYD OMR TND'.split(' ').map((code) => [code, 3] as const),
  ...'CLF UYW'.split(' ').map((code) => [code, 4] as const),
]);

/** True for three capital letters; whether such a currency exists is the form's question. */
export function isCurrencyCode(code: string): boolean {
  return /^[A-Z]{3}$/.test(code);
}

/**
 * Decimals of the currency's minor unit: 2 for most, 0 for yen, 3 for dinars. Source: ISO 4217.
 *
 * @throws RangeError when the code is not three capital letters
 */
export function minorDigits(currency: string): number {
  if (!isCurrencyCode(currency)) throw new RangeError(`Not a currency code: ${currency}`);
  return exceptions.get(currency) ?? 2;
}
