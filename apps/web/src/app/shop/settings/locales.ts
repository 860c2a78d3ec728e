import { type Choice } from '@lib/ui';

/** Where shops may be, by language and region. Every one writes numbers or days in its own way. */
const known = (
  'en-US en-GB en-CA en-AU en-NZ en-IE en-IN en-ZA de-DE de-AT de-CH fr-FR fr-BE fr-CH fr-CA ' +
  'es-ES es-MX es-AR pt-PT pt-BR it-IT it-CH nl-NL nl-BE da-DK sv-SE nb-NO fi-FI pl-PL cs-CZ ' +
  'hu-HU ro-RO el-GR tr-TR ja-JP ko-KR'
).split(' ');

/** Named in the language of the person, with an example, in the order of their names. */
export function locales(language: string): readonly Choice[] {
  const names = new Intl.DisplayNames(language, { type: 'language' });
  return known
    .map((value) => ({ value, label: `${names.of(value) ?? value}: ${example(value)}` }))
    .sort((a, b) => a.label.localeCompare(b.label, language));
}

function example(locale: string): string {
  const day = new Date(Date.UTC(2031, 4, 6));
  const written = new Intl.DateTimeFormat(locale, { dateStyle: 'short', timeZone: 'UTC' });
  return `${(1234.5).toLocaleString(locale, { minimumFractionDigits: 2 })}, ${written.format(day)}`;
}
