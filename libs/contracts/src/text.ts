import { z } from 'zod';

// eslint's no-control-regex would be right about regular expressions: these are code points.
function isCleanText(value: string): boolean {
  if (!value.isWellFormed()) return false;
  for (const character of value) {
    const code = character.codePointAt(0) ?? 0;
    const isSpace = code === 9 || code === 10 || code === 13;
    if ((code < 32 && !isSpace) || code === 127) return false;
  }
  return true;
}

/** One line a person typed: trimmed, not empty, without control characters or lone surrogates. */
export function line(max: number, min = 1) {
  return z
    .string()
    .refine((v) => isCleanText(v), { error: 'holds characters that cannot be stored' })
    .refine((v) => !/[\n\r\t]/.test(v), { error: 'holds a line break or a tab: one line is meant' })
    .trim()
    .min(min)
    .max(max);
}

/** Several lines a person typed; may be empty. */
export function words(max: number) {
  return z
    .string()
    .refine((v) => isCleanText(v), { error: 'holds characters that cannot be stored' })
    .trim()
    .max(max);
}

/** A password as typed: not trimmed, any character that can be typed, at most 128 (NIST SP 800-63B). */
export const password = z
  .string()
  .min(8)
  .max(128)
  .refine((v) => v.isWellFormed() && !v.includes('\u0000'), { error: 'holds a NUL' });

/** Folded to lower case, so that one address is one person. */
export const email = z.string().trim().toLowerCase().max(254).pipe(z.email());

export const phone = z
  .string()
  .trim()
  .max(40)
  .regex(/^\+?[0-9 ()./-]{3,40}$/, { error: 'is not a telephone number' });

/** Folded to lower case, as the database writes ids: two spellings are one id. */
export const id = z.uuid().toLowerCase();

/** A secret in a mailed link: 32 random bytes as base64url. */
export const token = z.string().regex(/^[A-Za-z0-9_-]{43}$/, { error: 'is not a valid token' });
