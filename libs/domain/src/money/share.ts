import { exact, roundFraction, safeNumber } from './rounding';

/**
 * Divides an amount by weights so that the parts add up to it exactly: every part gets the whole
 * units of its quota, and the units left over go one each to the largest remainders (Hamilton's
 * method); between equal remainders the earlier part comes first. A weight of zero gets nothing.
 * A negative total is the mirror of the positive one.
 *
 * @param total minor units (or minutes, or anything counted whole)
 * @param weights whole numbers of at least 0, at least one of them above 0
 * @example share(10000, [1, 1, 1]) // [3334, 3333, 3333]
 * @throws RangeError for weights that are negative, not whole, or all zero; for numbers past the
 *   safe integers. No weights share only a total of zero.
 */
export function share(total: number, weights: readonly number[]): number[] {
  const parts = weights.map((weight) => {
    if (weight < 0) throw new RangeError(`A weight is at least 0: ${weight}`);
    return exact(weight);
  });
  if (parts.length === 0 && total === 0) return [];
  const sum = parts.reduce((a, b) => a + b, 0n);
  if (sum === 0n) throw new RangeError('Sharing needs a weight above zero');
  return settleQuotas(
    parts.map((part) => part * exact(total)),
    sum,
    total,
  );
}

/**
 * Rounds fractions with a common denominator so that they add up to `total`, each to one of its
 * two neighbouring whole numbers, the largest remainders outwards first. Used where the sum is
 * already settled, as with the tax of a whole ticket that its lines must add up to.
 *
 * @param total a whole number that the fractions' sum rounds to, or that lies between the sums of
 *   their floors and of their ceilings
 * @throws RangeError when the total cannot be reached so
 */
export function settleQuotas(
  numerators: readonly bigint[],
  denominator: bigint,
  total: number,
): number[] {
  if (total < 0) {
    const mirrored = settleQuotas(
      numerators.map((numerator) => -numerator),
      denominator,
      -total,
    );
    return mirrored.map((part) => (part === 0 ? 0 : -part));
  }
  const floors = numerators.map((numerator) => roundFraction(numerator, denominator, 'floor'));
  const rests = numerators.map((numerator, i) => numerator - exact(floors[i] ?? 0) * denominator);
  let left = safeNumber(exact(total) - floors.reduce((sum, part) => sum + exact(part), 0n));
  const order = rests
    .map((rest, index) => ({ rest, index }))
    .filter(({ rest }) => rest > 0n)
    .sort((a, b) => (a.rest === b.rest ? a.index - b.index : a.rest > b.rest ? -1 : 1));
  if (left < 0 || left > order.length) {
    throw new RangeError(`The parts cannot be rounded to add up to ${total}`);
  }
  for (const { index } of order) {
    if (left === 0) break;
    floors[index] = (floors[index] ?? 0) + 1;
    left -= 1;
  }
  return floors;
}
