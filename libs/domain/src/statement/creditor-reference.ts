const longestReference = 21;

/**
 * A creditor reference that a payer's bank can check for typing errors, made from a number of ours.
 *
 * @param text up to 21 Latin letters and digits; spaces, dots, slashes, hyphens and underscores in
 *   it are left out, and small letters count as capitals: `S-2026/0142` -> `RF..S20260142`
 * @throws RangeError when nothing, too much, or another character is left
 * Source: ISO 11649; check digits by MOD 97-10 of ISO 7064.
 */
export function rfReference(text: string): string {
  const reference = text.replace(/[\s./_-]/g, '').toUpperCase();
  if (!/^[0-9A-Z]+$/.test(reference) || reference.length > longestReference) {
    throw new RangeError(`No reference of 1 to 21 letters and digits: ${text}`);
  }
  const check = 98 - remainder97(`${reference}RF00`);
  return `RF${String(check).padStart(2, '0')}${reference}`;
}

/** True when well-formed and its check digits fit. Spaces and small letters are accepted. */
export function isValidRfReference(text: string): boolean {
  const compact = text.replace(/ /g, '').toUpperCase();
  if (!/^RF\d{2}[0-9A-Z]{1,21}$/.test(compact)) return false;
  return remainder97(compact.slice(4) + compact.slice(0, 4)) === 1;
}

/** As it is printed: in groups of four (ISO 11649). */
export function printedRfReference(reference: string): string {
  return reference.replace(/(.{4})(?=.)/g, '$1 ');
}

/** The text read as one long number, A as 10 to Z as 35, modulo 97, digit by digit. */
function remainder97(text: string): number {
  let remainder = 0;
  for (const character of text) {
    for (const digit of String(parseInt(character, 36))) {
      remainder = (remainder * 10 + Number(digit)) % 97;
    }
  }
  return remainder;
}
