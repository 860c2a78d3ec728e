/**
 * WCAG 2.2, "contrast ratio": 21:1 is black on white. #777777 on white is printed as 4.48:1 and
 * #767676, the lightest grey that still passes, as 4.54:1 throughout the literature on it.
 */
import { contrastRatio } from '@lib/domain';
import axe from 'axe-core';
import * as fc from 'fast-check';
import { colours, contrastPairs } from '../../libs/ui/src/tokens/tokens';

/** What this check uses of axe-core's colour functions; its own types leave them out. */
interface AxeColour {
  color: {
    Color: new (red: number, green: number, blue: number, alpha: number) => unknown;
    getContrast(one: unknown, other: unknown): number;
  };
}

describe('contrast by published figures', () => {
  it.each([
    ['#000000', '#ffffff', 21],
    ['#777777', '#ffffff', 4.48],
    ['#767676', '#ffffff', 4.54],
  ])('%s on %s is %d', (text, ground, ratio) => {
    expect(contrastRatio(text, ground)).toBeCloseTo(ratio, 2);
  });
});

describe('contrast beside axe-core', () => {
  it('agrees on whatever colours', () => {
    const { Color, getContrast } = (axe.commons as unknown as AxeColour).color;
    const colour = fc.tuple(fc.nat(255), fc.nat(255), fc.nat(255));
    const hex = (channels: number[]) =>
      `#${channels.map((channel) => channel.toString(16).padStart(2, '0')).join('')}`;
    fc.assert(
      fc.property(colour, colour, (one, other) => {
        const theirs = getContrast(new Color(...one, 1), new Color(...other, 1));
        expect(contrastRatio(hex(one), hex(other))).toBeCloseTo(theirs, 6);
      }),
      { seed: 143, numRuns: 500 },
    );
  });
});

describe('the colours of the look', () => {
  const pairs = contrastPairs.flatMap(({ text, on, atLeast }) =>
    (['light', 'dark'] as const).map((scheme) => ({ text, on, atLeast, scheme })),
  );

  it.each(pairs)('$text on $on in the $scheme scheme is at least $atLeast', (pair) => {
    const { text, on, atLeast, scheme } = pair;
    expect(contrastRatio(colours[text][scheme], colours[on][scheme])).toBeGreaterThanOrEqual(
      atLeast,
    );
  });
});
