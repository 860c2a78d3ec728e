import { stickerCode } from './sticker-code';

describe('a sticker code', () => {
  const codes = Array.from({ length: 2000 }, stickerCode);

  it('holds no letter or digit that is mistaken for another', () => {
    expect(codes.filter((code) => !/^[2-9AC-FHJKMNP-RT-Y]{8}$/.test(code))).toEqual([]);
    expect(codes.join('')).not.toMatch(/[01OILSBGZ]/);
  });

  it('does not come twice', () => {
    expect(new Set(codes).size).toBe(codes.length);
  });
});
