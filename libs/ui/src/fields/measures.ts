/** "8.25" percent in basis points, at most three decimals finer than one; undefined when it is none. */
export function basisPointsFrom(text: string): number | undefined {
  const plain = text.trim().replace(/\s*%$/, '').replace(',', '.');
  if (!/^\d{1,4}(\.\d{1,5})?$/.test(plain)) return undefined;
  const [whole = '0', fraction = ''] = plain.split('.');
  // Put together as text, because 8.875 * 100 is not exactly what it looks like.
  const moved = `${whole}${fraction.padEnd(2, '0').slice(0, 2)}.${fraction.slice(2) || '0'}`;
  return Number(moved);
}

/** 825 basis points as people write them: "8.25". */
export function percentText(basisPoints: number): string {
  return String(Number((basisPoints / 100).toFixed(5)));
}

interface DistanceUnit {
  readonly sign: 'mi' | 'km';
  readonly metres: number;
}

/** Where roads are measured in miles (Unicode CLDR, measurement system "US" and "UK"). */
const regionsWithMiles = ['US', 'GB', 'LR', 'MM'];

export function distanceUnit(locale: string): DistanceUnit {
  const region = new Intl.Locale(locale).maximize().region ?? '';
  return regionsWithMiles.includes(region)
    ? { sign: 'mi', metres: 1609.344 }
    : { sign: 'km', metres: 1000 };
}

export function metresFrom(text: string, unit: DistanceUnit): number | undefined {
  const plain = text.trim().replace(',', '.');
  if (!/^\d{1,5}(\.\d{1,3})?$/.test(plain)) return undefined;
  return Math.round(Number(plain) * unit.metres);
}

/** 40,234 metres: "25" in miles; at most two decimals. */
export function distanceText(metres: number, unit: DistanceUnit): string {
  return String(Number((metres / unit.metres).toFixed(2)));
}
