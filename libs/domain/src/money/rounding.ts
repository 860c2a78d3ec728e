/**
 * All rounding of the product. Amounts are integers of the currency's minor unit; whatever falls
 * between two of them is an exact fraction of BigInts until one of these functions decides. No
 * binary fraction (0.1 + 0.2) ever stands for money.
 */
export type Integer = number | bigint;

/**
 * How a fraction between two whole numbers is settled.
 * - `half_up`: to the nearest; halves away from zero, so that a credit note mirrors its charge.
 *   This is the rule of sales tax (Streamlined Sales and Use Tax Agreement, section 324: carry to
 *   the third decimal, next cent when that is greater than four) and of EN 16931.
 * - `half_even`: to the nearest; halves to the even neighbour (IEEE 754 roundTiesToEven).
 * - `up`: away from zero. `down`: towards zero.
 * - `floor`: to the next lower, `ceiling`: to the next higher number.
 */
export type RoundingMode = 'half_up' | 'half_even' | 'up' | 'down' | 'floor' | 'ceiling';

/**
 * The whole number that `numerator / denominator` rounds to.
 *
 * @throws RangeError for a denominator of zero, a number that is not a safe integer, or a result
 *   past the safe integers
 */
export function roundFraction(
  numerator: Integer,
  denominator: Integer,
  mode: RoundingMode,
): number {
  let over = exact(numerator);
  let under = exact(denominator);
  if (under === 0n) throw new RangeError('Division by zero');
  if (under < 0n) {
    over = -over;
    under = -under;
  }
  const negative = over < 0n;
  const size = negative ? -over : over;
  const whole = size / under;
  const rest = size % under;
  const rounded = whole + (goesOut(whole, rest, under, negative, mode) ? 1n : 0n);
  return safeNumber(negative ? -rounded : rounded);
}

/** Nearest whole number, halves away from zero: 2.5 is 3, -2.5 is -3. */
export function roundHalfUp(numerator: Integer, denominator: Integer): number {
  return roundFraction(numerator, denominator, 'half_up');
}

/** Nearest whole number, halves to the even one: 2.5 is 2, 3.5 is 4. */
export function roundHalfEven(numerator: Integer, denominator: Integer): number {
  return roundFraction(numerator, denominator, 'half_even');
}

/**
 * `amount x times / per`, rounded once at the end; the product may pass the safe integers.
 *
 * @example multiplyDivide(9900, 45, 60) // 45 minutes at 99.00 an hour: 7425
 * @throws RangeError as `roundFraction`
 */
export function multiplyDivide(
  amount: Integer,
  times: Integer,
  per: Integer,
  mode: RoundingMode = 'half_up',
): number {
  return roundFraction(exact(amount) * exact(times), per, mode);
}

/**
 * `numerator / denominator` rounded to a multiple of `step`, in one rounding: 1.995 to whole cents
 * and then to five would go wrong twice.
 *
 * @param step whole number of at least 1
 * @throws RangeError as `roundFraction`, or for a step below 1
 */
export function roundToStep(
  numerator: Integer,
  denominator: Integer,
  step: number,
  mode: RoundingMode = 'half_up',
): number {
  if (exact(step) < 1n) throw new RangeError(`A step is at least 1: ${step}`);
  const steps = roundFraction(numerator, exact(denominator) * exact(step), mode);
  return safeNumber(exact(steps) * exact(step));
}

/** @throws RangeError when the number is not an integer that JavaScript holds exactly */
export function exact(value: Integer): bigint {
  if (typeof value === 'bigint') return value;
  if (!Number.isSafeInteger(value)) throw new RangeError(`Not a safe integer: ${value}`);
  return BigInt(value);
}

/** @throws RangeError when the integer is past what JavaScript holds exactly (2^53 - 1) */
export function safeNumber(value: bigint): number {
  const number = Number(value);
  if (!Number.isSafeInteger(number)) throw new RangeError(`Past the safe integers: ${value}`);
  return number;
}

function goesOut(
  whole: bigint,
  rest: bigint,
  under: bigint,
  negative: boolean,
  mode: RoundingMode,
): boolean {
  if (rest === 0n) return false;
  const half = rest * 2n - under;
  switch (mode) {
    case 'half_up':
      return half >= 0n;
    case 'half_even':
      return half > 0n || (half === 0n && whole % 2n === 1n);
    case 'up':
      return true;
    case 'down':
      return false;
    case 'floor':
      return negative;
    case 'ceiling':
      return !negative;
  }
}
