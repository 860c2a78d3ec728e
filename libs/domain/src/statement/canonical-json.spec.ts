import * as fc from 'fast-check';
import { canonicalJson } from './canonical-json';

describe('canonical JSON', () => {
  it('means the same as what went in', () => {
    fc.assert(
      fc.property(fc.jsonValue({ noUnicodeString: false }), (value) => {
        expect(JSON.parse(canonicalJson(value))).toEqual(JSON.parse(JSON.stringify(value)));
      }),
    );
  });

  it('does not depend on the order of keys', () => {
    expect(canonicalJson({ b: [{ y: 1, x: 2 }], a: undefined })).toBe('{"b":[{"x":2,"y":1}]}');
    expect(canonicalJson({ a: undefined, b: [{ x: 2, y: 1 }] })).toBe('{"b":[{"x":2,"y":1}]}');
  });

  it('refuses what would not survive being stored', () => {
    for (const value of [NaN, Infinity, 1n, undefined, () => 0, new Date(0), new Map(), '\ud800'])
      expect(() => canonicalJson({ value: [value] })).toThrow(TypeError);
  });
});
