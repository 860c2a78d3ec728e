import { deviceWords } from './device-words';

describe('deviceWords', () => {
  const safari = 'AppleWebKit/605.1.15 (KHTML, like Gecko) Version/17.4';
  const chrome = 'AppleWebKit/537.36 (KHTML, like Gecko) Chrome/124.0.0.0';

  it.each([
    [`Mozilla/5.0 (X11; Linux x86_64) ${chrome} Safari/537.36`, 'Chrome on Linux'],
    [`Mozilla/5.0 (Linux; Android 10; K) ${chrome} Mobile Safari/537.36`, 'Chrome on Android'],
    [`Mozilla/5.0 (Windows NT 10.0) ${chrome} Safari/537.36 Edg/124.0.0.0`, 'Edge on Windows'],
    ['Mozilla/5.0 (Windows NT 10.0; rv:125.0) Gecko/20100101 Firefox/125.0', 'Firefox on Windows'],
    [`Mozilla/5.0 (Macintosh; Intel Mac OS X 10_15) ${safari} Safari/605.1.15`, 'Safari on a Mac'],
    [
      `Mozilla/5.0 (iPhone; CPU iPhone OS 17_4 like Mac OS X) ${safari} Mobile Safari/604.1`,
      'Safari on an iPhone',
    ],
  ])('names the browser and where it runs: %s', (userAgent, words) => {
    expect(deviceWords(userAgent)).toBe(words);
  });

  it('shows what it does not know as it is', () => {
    expect(deviceWords('curl/8.5.0')).toBe('curl/8.5.0');
    expect(deviceWords('')).toBe('A device that does not name itself');
  });
});
