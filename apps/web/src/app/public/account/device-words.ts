const browsers: readonly (readonly [RegExp, string])[] = [
  // Most browsers claim to be others too: the first that matches is the true one.
  [/Edg(?:e|A|iOS)?\//, 'Edge'],
  [/OPR\//, 'Opera'],
  [/SamsungBrowser\//, 'Samsung Internet'],
  [/(?:Firefox|FxiOS)\//, 'Firefox'],
  [/(?:Chrome|CriOS)\//, 'Chrome'],
  [/Safari\//, 'Safari'],
];

const systems: readonly (readonly [RegExp, string])[] = [
  [/iPhone|iPod/, 'an iPhone'],
  [/iPad/, 'an iPad'],
  [/Android/, 'Android'],
  [/Windows/, 'Windows'],
  [/CrOS/, 'a Chromebook'],
  [/Mac OS X|Macintosh/, 'a Mac'],
  [/Linux/, 'Linux'],
];

/** "Firefox on Windows", of what a browser says of itself; what is not known is shown as it is. */
export function deviceWords(userAgent: string): string {
  const browser = browsers.find(([pattern]) => pattern.test(userAgent))?.[1];
  const system = systems.find(([pattern]) => pattern.test(userAgent))?.[1];
  if (browser && system) return `${browser} on ${system}`;
  return browser ?? (userAgent || 'A device that does not name itself');
}
