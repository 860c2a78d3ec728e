import { commonPasswords } from './common-passwords';

export type PasswordProblem =
  'too_short' | 'too_long' | 'common' | 'repetitive' | 'sequential' | 'personal';

export interface PasswordVerdict {
  acceptable: boolean;
  problems: { code: PasswordProblem; words: string }[];
  /** For a password that is acceptable and could easily be better. */
  advice?: string;
}

export const passwordLength = { least: 8, suggested: 12, most: 128 } as const;

/** Context words shorter than this would refuse half the dictionary. */
const shortestContextWord = 4;

const words: Record<PasswordProblem, string> = {
  too_short: `It needs at least ${passwordLength.least} characters; a short sentence is easy to keep.`,
  too_long: `It has more than ${passwordLength.most} characters.`,
  common: 'It is one of the passwords that are tried first.',
  repetitive: 'It repeats a few characters.',
  sequential: 'It follows the order of the alphabet or of the digits.',
  personal: 'Besides a name that is easy to find out there is too little in it.',
};

/**
 * Whether a new password may be used. Judged are its length and whether it would be guessed
 * early; no kinds of characters are demanded and none are forbidden, spaces and all languages
 * included.
 *
 * @param contextWords what a stranger would try: the person's name, the parts of the address, the
 *   shop's name, ours
 * Source: NIST SP 800-63B, 5.1.1.2: at least 8 characters, at least 64 allowed, each code point
 * one character after normalisation (NFKC); compared with common, repetitive, sequential and
 * context-specific ones; no composition rules.
 */
export function passwordVerdict(
  password: string,
  contextWords: readonly string[] = [],
): PasswordVerdict {
  const characters = [...password.normalize('NFKC')];
  const folded = fold(password);
  const found: Record<PasswordProblem, boolean> = {
    too_short: characters.length < passwordLength.least,
    too_long: characters.length > passwordLength.most,
    common: isCommon(folded),
    repetitive: new Set(folded).size <= 3 || /^(.{1,4})\1+$/u.test(folded),
    sequential: isSequential(folded),
    personal: isPersonal(folded, contextWords),
  };
  const problems = (Object.keys(found) as PasswordProblem[])
    .filter((code) => found[code])
    .map((code) => ({ code, words: words[code] }));
  if (problems.length > 0) return { acceptable: false, problems };
  if (characters.length >= passwordLength.suggested) return { acceptable: true, problems };
  const advice = `With ${passwordLength.suggested} characters or more it is far harder to guess.`;
  return { acceptable: true, problems, advice };
}

function fold(text: string): string {
  return text.normalize('NFKC').toLowerCase();
}

/** Also with digits and signs put at its ends, and with digits in place of letters. */
function isCommon(folded: string): boolean {
  const bare = folded.replace(/^[^\p{L}]+|[^\p{L}]+$/gu, '');
  const additions = folded.length - bare.length;
  const spelled = folded.replace(/[01345@$]/g, (sign) => lookalikes[sign] ?? sign);
  const bareSpelled = spelled.replace(/[^\p{L}]+$/u, '');
  return (
    commonPasswords.has(folded) ||
    commonPasswords.has(spelled) ||
    (additions <= 5 && commonPasswords.has(bare)) ||
    (folded.length - bareSpelled.length <= 5 && commonPasswords.has(bareSpelled))
  );
}

const lookalikes: Record<string, string> = {
  '0': 'o',
  '1': 'l',
  '3': 'e',
  '4': 'a',
  '5': 's',
  '@': 'a',
  $: 's',
};

/** Three steps of four go to a neighbour in the alphabet or among the digits, as in 1234abcd. */
function isSequential(folded: string): boolean {
  const codes = [...folded].map((character) => character.codePointAt(0) ?? 0);
  const steps = codes.slice(1).map((code, index) => Math.abs(code - (codes[index] ?? 0)));
  const neighbours = steps.filter((step) => step === 1).length;
  return steps.length > 0 && neighbours * 4 >= steps.length * 3;
}

function isPersonal(folded: string, contextWords: readonly string[]): boolean {
  const names = contextWords
    .flatMap((word) => [fold(word), ...fold(word).split(/[^\p{L}\p{N}]+/u)])
    .filter((word) => [...word].length >= shortestContextWord)
    .sort((a, b) => b.length - a.length);
  const left = names.reduce((rest, name) => rest.replaceAll(name, ''), folded);
  return left !== folded && [...left].length < passwordLength.least;
}
