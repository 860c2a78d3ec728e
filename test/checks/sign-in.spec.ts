import { createHmac } from 'node:crypto';
import jwt from 'jsonwebtoken';
import { Secret, TOTP } from 'otpauth';

describe('JWS with HS256: RFC 7515, A.1, the standard’s own example', () => {
  const key = Buffer.from(
    'AyM1SysPpbyDfgZld3umj1qzKObwVMkoqQ-EstJQLr_T-1qS0gZH75aKtMN3Yj0iPS4hcgUuTwjAzZr1Z9CAow',
    'base64url',
  );
  const signed =
    'eyJ0eXAiOiJKV1QiLA0KICJhbGciOiJIUzI1NiJ9' +
    '.eyJpc3MiOiJqb2UiLA0KICJleHAiOjEzMDA4MTkzODAsDQogImh0dHA6Ly9leGFtcGxlLmNvbS9pc19yb290Ijp0cnVlfQ';
  const signature = 'dBjftJeZ4CVP-mB92K27uhbUJU1p1r_wW1gFWFOEjXk';
  const token = `${signed}.${signature}`;
  const verify = (text: string, clockTimestamp: number) =>
    jwt.verify(text, key, { algorithms: ['HS256'], clockTimestamp });

  it('has the printed signature', () => {
    expect(createHmac('sha256', key).update(signed).digest('base64url')).toBe(signature);
  });

  it('is accepted by the library that checks our access tokens, until it expires', () => {
    expect(verify(token, 1300819379)).toEqual({
      iss: 'joe',
      exp: 1300819380,
      'http://example.com/is_root': true,
    });
    expect(() => verify(token, 1300819380)).toThrow(/expired/);
  });

  it('is refused with one character changed, without a signature, or under another algorithm', () => {
    expect(() => verify(`${signed}.e${signature.slice(1)}`, 1300819379)).toThrow(/signature/);
    const unsigned = Buffer.from('{"alg":"none"}').toString('base64url');
    expect(() => verify(`${unsigned}.${signed.split('.')[1]}.`, 1300819379)).toThrow();
    const other = jwt.sign({ iss: 'joe' }, key, { algorithm: 'HS384' });
    expect(() => verify(other, 1300819379)).toThrow(/algorithm/);
  });
});

describe('TOTP: RFC 6238, appendix B', () => {
  const seeds = {
    SHA1: '12345678901234567890',
    SHA256: '12345678901234567890123456789012',
    SHA512: '1234567890123456789012345678901234567890123456789012345678901234',
  };

  it.each([
    [59, '94287082', '46119246', '90693936'],
    [1111111109, '07081804', '68084774', '25091201'],
    [1111111111, '14050471', '67062674', '99943326'],
    [1234567890, '89005924', '91819424', '93441116'],
    [2000000000, '69279037', '90698825', '38618901'],
    [20000000000, '65353130', '77737706', '47863826'],
  ])('at %i s shows the printed codes', (seconds, sha1, sha256, sha512) => {
    const codes = (['SHA1', 'SHA256', 'SHA512'] as const).map((algorithm) => {
      const secret = Secret.fromLatin1(seeds[algorithm]);
      return new TOTP({ secret, algorithm, digits: 8, period: 30 }).generate({
        timestamp: seconds * 1000,
      });
    });
    expect(codes).toEqual([sha1, sha256, sha512]);
  });

  it('accepts the step before and after and no further, as a window of one does', () => {
    const totp = new TOTP({ secret: Secret.fromLatin1(seeds.SHA1), digits: 8, period: 30 });
    const at = (seconds: number) =>
      totp.validate({ token: '94287082', timestamp: seconds * 1000, window: 1 });
    expect([at(29), at(59), at(89), at(90)]).toEqual([1, 0, -1, null]);
  });
});
