import { multiplyDivide } from '../money/rounding';

const secondsADay = 86_400;

/**
 * What a machine takes on a usual day.
 *
 * @param vendPrice of one cycle, in minor units
 * @param cyclesADay with at most one decimal
 */
export function takingsADay(vendPrice: number, cyclesADay: number): number {
  return multiplyDivide(vendPrice, Math.round(cyclesADay * 10), 10);
}

/**
 * What a machine did not take while it stood still: an estimate, told as one. Nights and holidays
 * are in the usual day already, so time is counted as it passes.
 *
 * @param perDay in minor units
 * @returns 0 when `until` is not after `from`
 */
export function missedTakings(perDay: number, from: Date, until: Date): number {
  const seconds = Math.floor((until.getTime() - from.getTime()) / 1000);
  return seconds > 0 ? multiplyDivide(perDay, seconds, secondsADay) : 0;
}
