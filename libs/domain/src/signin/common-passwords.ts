/**
 * The passwords that turn up first in every published list of stolen ones, in small letters.
 * Short ones are here too: people reach eight characters by adding a year or an exclamation mark.
 */
export const commonPasswords: ReadonlySet<string> = new Set(
  `
  password passwort passw0rd p@ssword p@ssw0rd pass1234 changeme default guest secret
  admin administrator root login master access welcome letmein trustno1 whatever
  qwerty qwertyuiop qwertz azerty asdfgh asdfghjkl zxcvbn zxcvbnm qazwsx qazwsxedc
  1q2w3e4r 1q2w3e4r5t 1qaz2wsx q1w2e3r4 zaq12wsx qwer1234 asdf1234 abc123 abcd1234
  123123 123123123 123321 112233 121212 654321 987654321 147258369 789456123 11223344
  iloveyou loveme lovely sunshine princess flower football baseball basketball soccer hockey
  monkey dragon tiger shadow superman batman spiderman starwars pokemon naruto
  michael jennifer jordan charlie jessica ashley daniel thomas robert andrew matthew
  computer internet samsung google hunter killer freedom summer winter spring autumn
  monday january december chocolate cookie cheese banana orange pepper ginger
  laundry laundromat washer washing dryer repair service
  `
    .trim()
    .split(/\s+/),
);
