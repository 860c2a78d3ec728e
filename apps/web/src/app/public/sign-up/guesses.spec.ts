import { currencies, guessesFrom, zonesWith } from './guesses';

describe('what is guessed at sign-up', () => {
  it.each([
    ['en-GB', 'Europe/London', { locale: 'en-GB', zone: 'Europe/London', currency: 'GBP' }],
    ['de', 'Europe/Vienna', { locale: 'de-DE', zone: 'Europe/Vienna', currency: 'EUR' }],
    ['en-US', undefined, { locale: 'en-US', zone: 'UTC', currency: 'USD' }],
    ['ar-AE', 'Mars/Base', { locale: 'ar-AE', zone: 'UTC', currency: 'USD' }],
  ])('from %s in %s', (language, zone, guesses) => {
    expect(guessesFrom(language, zone)).toEqual(guesses);
  });

  it('offers the guessed zone and known currencies', () => {
    expect(zonesWith('Etc/Odd')[0]).toBe('Etc/Odd');
    expect(currencies('en').find(({ code }) => code === 'NOK')?.name).toBe('NOK, Norwegian Krone');
  });
});
