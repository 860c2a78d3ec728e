/** Currencies of the places most people sign up from; anyone else picks from the list. */
const currencyOfRegion: Readonly<Record<string, string>> = {
  AU: 'AUD',
  CA: 'CAD',
  CH: 'CHF',
  CZ: 'CZK',
  DK: 'DKK',
  GB: 'GBP',
  IN: 'INR',
  JP: 'JPY',
  MX: 'MXN',
  NO: 'NOK',
  NZ: 'NZD',
  PL: 'PLN',
  SE: 'SEK',
  US: 'USD',
  ZA: 'ZAR',
};
const euroRegions = 'AT BE CY DE EE ES FI FR GR HR IE IT LT LU LV MT NL PT SI SK'.split(' ');

interface Guesses {
  readonly locale: string;
  readonly zone: string;
  readonly currency: string;
}

/** What a browser gives away about where a shop is, for the person to correct. */
export function guessesFrom(language: string, zone: string | undefined): Guesses {
  const { language: tongue, region } = new Intl.Locale(language).maximize();
  const currency = euroRegions.includes(region ?? '') ? 'EUR' : currencyOfRegion[region ?? ''];
  return {
    locale: region && /^[A-Z]{2}$/.test(region) ? `${tongue}-${region}` : 'en-US',
    zone: zone && isZone(zone) ? zone : 'UTC',
    currency: currency ?? 'USD',
  };
}

function isZone(zone: string): boolean {
  try {
    return !!new Intl.DateTimeFormat('en', { timeZone: zone });
  } catch {
    return false;
  }
}

/** Every zone the browser knows, with the guessed one even if it is an older name. */
export function zonesWith(guessed: string): readonly string[] {
  const zones = Intl.supportedValuesOf('timeZone');
  return zones.includes(guessed) ? zones : [guessed, ...zones];
}

export function currencies(language: string): readonly { code: string; name: string }[] {
  const names = new Intl.DisplayNames(language, { type: 'currency' });
  return Intl.supportedValuesOf('currency').map((code) => ({
    code,
    name: `${code}, ${names.of(code) ?? code}`,
  }));
}
