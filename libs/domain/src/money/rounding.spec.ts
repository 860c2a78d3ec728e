import fc from 'fast-check';
import { multiplyDivide, roundFraction, roundHalfEven, roundHalfUp, roundToStep } from './rounding';

describe('rounding', () => {
  it.each([
    [25, 10, 3, 2],
    [35, 10, 4, 4],
    [-25, 10, -3, -2],
    [24, 10, 2, 2],
    [26, -10, -3, -3],
    [1, 3, 0, 0],
    [0, 7, 0, 0],
  ])('%d / %d is %d half up and %d half even', (over, under, halfUp, halfEven) => {
    expect(roundHalfUp(over, under)).toBe(halfUp);
    expect(roundHalfEven(over, under)).toBe(halfEven);
  });

  it.each([
    ['up', 3, -3],
    ['down', 2, -2],
    ['floor', 2, -3],
    ['ceiling', 3, -2],
  ] as const)('21 / 10 and -21 / 10 go %s to %d and %d', (mode, positive, negative) => {
    expect(roundFraction(21, 10, mode)).toBe(positive);
    expect(roundFraction(-21, 10, mode)).toBe(negative);
  });

  it('multiplies past the safe integers without losing a unit', () => {
    expect(multiplyDivide(Number.MAX_SAFE_INTEGER, 10_000, 10_000)).toBe(Number.MAX_SAFE_INTEGER);
  });

  it('rounds to a step once, not to a unit first', () => {
    // 22.45 to tens is 20; to whole and then to fives and tens it would creep to 30.
    expect(roundToStep(2245, 100, 5)).toBe(20);
    expect(roundToStep(2250, 100, 5)).toBe(25);
    expect(roundToStep(2201, 100, 50, 'up')).toBe(50);
  });

  it('refuses what it cannot do exactly', () => {
    expect(() => roundHalfUp(1, 0)).toThrow(RangeError);
    expect(() => roundHalfUp(0.5, 1)).toThrow(RangeError);
    expect(() => roundHalfUp(Number.MAX_SAFE_INTEGER + 1, 1)).toThrow(RangeError);
    expect(() => multiplyDivide(Number.MAX_SAFE_INTEGER, 2, 1)).toThrow(RangeError);
    expect(() => roundToStep(1, 1, 0)).toThrow(RangeError);
  });

  const whole = fc.integer({ min: -1_000_000_000, max: 1_000_000_000 });
  const positive = fc.integer({ min: 1, max: 1_000_000 });

  it('is never more than half away, and mirrors', () => {
    fc.assert(
      fc.property(whole, positive, (over, under) => {
        const rounded = roundHalfUp(over, under);
        expect(Math.abs(2 * (over - rounded * under))).toBeLessThanOrEqual(under);
        expect(roundHalfUp(-over, under) + rounded).toBe(0);
        expect(roundHalfEven(-over, under) + roundHalfEven(over, under)).toBe(0);
      }),
    );
  });
});
