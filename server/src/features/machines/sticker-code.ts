import { randomInt } from 'node:crypto';

/** Letters and digits that nobody mistakes for another, read aloud or worn on a sticker. */
const alphabet = '23456789ACDEFHJKMNPQRTUVWXY';

/** What is printed on a machine's sticker: 27^8 codes, so that guessing finds none. */
export function stickerCode(): string {
  return Array.from({ length: 8 }, () => alphabet[randomInt(alphabet.length)]).join('');
}
