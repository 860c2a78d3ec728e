import * as fc from 'fast-check';
import { passwordVerdict } from './password-verdict';

const codes = (password: string, context?: string[]) =>
  passwordVerdict(password, context).problems.map(({ code }) => code);

describe('a new password', () => {
  it('is judged by its length in characters, not bytes or code units', () => {
    expect(codes('gu4vXx!')).toEqual(['too_short']);
    expect(codes('gu4vXx!q')).toEqual([]);
    expect(codes('чайникдъ')).toEqual([]);
    expect(codes('\u{1F9FA}\u{1F9FC}\u{1F6BF}\u{1F9F4}\u{1F4A7}')).toContain('too_short');
    expect(codes('one of ninety '.repeat(9) + 'xy')).toEqual([]); // 128
    expect(codes('one of ninety '.repeat(9) + 'xyz')).toEqual(['too_long']); // 129
  });

  it('may be any sentence, without kinds of characters demanded', () => {
    expect(passwordVerdict('the third dryer hums')).toEqual({ acceptable: true, problems: [] });
  });

  it('comes with advice when it is short', () => {
    expect(passwordVerdict('gu4vXx!q').advice).toMatch(/12 characters/);
  });

  it.each([
    ['password', 'common'],
    ['Password1!', 'common'],
    ['P@ssw0rd2026', 'common'],
    ['2026welcome', 'common'],
    ['letmein!!', 'common'],
    ['QWERTYUIOP', 'common'],
    ['1q2w3e4r', 'common'],
    ['laundromat1', 'common'],
    ['aaaaaaaaaaaa', 'repetitive'],
    ['abcabcabcabc', 'repetitive'],
    ['12121212', 'repetitive'],
    ['123456789', 'sequential'],
    ['87654321', 'sequential'],
    ['1234abcd', 'sequential'],
    ['ＰＡＳＳＷＯＲＤ', 'common'],
  ])('is refused as %s', (password, problem) => {
    expect(codes(password)).toContain(problem);
    expect(passwordVerdict(password).acceptable).toBe(false);
  });

  it('is refused when it is little more than a name a stranger would try', () => {
    const context = ['Rosa Quill', 'rosa.quill@suds.example', 'Tumblewright'];
    expect(codes('Tumblewright1', context)).toEqual(['personal']);
    expect(codes('rosa.quill@suds', context)).toEqual(['personal']);
    expect(codes('Quill2026!', context)).toEqual(['personal']);
    expect(codes('quill pens and green ink', context)).toEqual([]);
    expect(codes('the bus came late', ['the', 'bus'])).toEqual([]);
  });

  it('of random characters is never refused for being guessable', () => {
    const random = fc.string({
      unit: fc.constantFrom(...'bdfhjlnprtvxz2468BDFHJLNPRTVXZ!?#%&'),
      minLength: 16,
      maxLength: 60,
    });
    fc.assert(
      fc.property(random, (password) => {
        fc.pre(new Set(password.toLowerCase()).size > 8);
        expect(codes(password)).toEqual([]);
      }),
    );
  });

  it('of any text gets a verdict', () => {
    const any = fc.string({ unit: 'binary', maxLength: 200 });
    fc.assert(
      fc.property(any, fc.array(any, { maxLength: 3 }), (password, context) => {
        const { acceptable, problems } = passwordVerdict(password, context);
        expect(acceptable).toBe(problems.length === 0);
      }),
    );
  });
});
