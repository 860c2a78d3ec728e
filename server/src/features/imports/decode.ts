import { FileRefused } from './file-refused';

/**
 * The text of a file in UTF-8 or UTF-16, with or without a byte order mark (Unicode Standard, 23.8).
 * Without one, zero bytes in every other place tell UTF-16: lists are mostly of Latin letters,
 * digits and separators.
 */
export function decodeText(content: Buffer): string {
  const encoding = encodingOf(content);
  try {
    return new TextDecoder(encoding, { fatal: true }).decode(content);
  } catch {
    throw new FileRefused(
      'The file is neither UTF-8 nor UTF-16: save it as “CSV UTF-8” and send it again.',
    );
  }
}

function encodingOf(content: Buffer): 'utf-8' | 'utf-16le' | 'utf-16be' {
  if (content[0] === 0xff && content[1] === 0xfe) return 'utf-16le';
  if (content[0] === 0xfe && content[1] === 0xff) return 'utf-16be';
  const start = content.subarray(0, 1000);
  let evenZeros = 0;
  let oddZeros = 0;
  start.forEach((byte, i) => {
    if (byte !== 0) return;
    if (i % 2 === 0) evenZeros++;
    else oddZeros++;
  });
  const many = start.length / 4;
  if (oddZeros > many && evenZeros < oddZeros / 4) return 'utf-16le';
  if (evenZeros > many && oddZeros < evenZeros / 4) return 'utf-16be';
  return 'utf-8';
}
