/**
 * Contrast of two opaque colours, from 1 (none) to 21 (black on white). Source: WCAG 2.2,
 * "contrast ratio" and "relative luminance". Text needs at least 4.5, large text and parts of the
 * interface 3 (success criteria 1.4.3 and 1.4.11).
 *
 * @param one colour as `#rgb` or `#rrggbb`
 * @throws RangeError for anything else
 */
export function contrastRatio(one: string, other: string): number {
  const lighter = Math.max(relativeLuminance(one), relativeLuminance(other));
  const darker = Math.min(relativeLuminance(one), relativeLuminance(other));
  return (lighter + 0.05) / (darker + 0.05);
}

/** 0 for black, 1 for white. */
export function relativeLuminance(hex: string): number {
  const [red, green, blue] = channels(hex).map(linear) as [number, number, number];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function channels(hex: string): number[] {
  const digits = /^#([\da-f]{3}|[\da-f]{6})$/i.exec(hex)?.[1];
  if (!digits) throw new RangeError(`Not a colour (#rrggbb): ${hex}`);
  const pairs = digits.length === 3 ? digits.replace(/./g, '$&$&') : digits;
  return [0, 2, 4].map((at) => parseInt(pairs.slice(at, at + 2), 16));
}

function linear(channel: number): number {
  const value = channel / 255;
  return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4;
}
