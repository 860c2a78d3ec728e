import { contrastRatio, relativeLuminance } from './contrast';

describe('contrastRatio', () => {
  it('is the same either way round, and 1 for a colour on itself', () => {
    expect(contrastRatio('#1d2436', '#fbfaf5')).toBe(contrastRatio('#fbfaf5', '#1d2436'));
    expect(contrastRatio('#3a3f9c', '#3a3f9c')).toBe(1);
  });

  it('reads short and upper-case colours', () => {
    expect(contrastRatio('#FFF', '#000')).toBe(contrastRatio('#ffffff', '#000000'));
  });

  it('weighs green most', () => {
    expect(relativeLuminance('#00ff00')).toBeCloseTo(0.7152, 10);
    expect(relativeLuminance('#ff0000')).toBeCloseTo(0.2126, 10);
  });

  it.each(['', 'white', '#12345', '#1234567', '#ggg', '123456'])('refuses %p', (colour) => {
    expect(() => contrastRatio(colour, '#000000')).toThrow(RangeError);
  });
});
