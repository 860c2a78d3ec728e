import { readConfig, useConfig } from '../config';
import { mailedToken, tokenHash } from './mailed-token';
import { hashPassword, passwordMatches } from './password';
import { seal, unseal } from './sealed';

function withSecret(secret: string) {
  useConfig(
    readConfig({
      NODE_ENV: 'test',
      DATABASE_APP_URL: 'postgres://x',
      DATABASE_PLATFORM_URL: 'postgres://x',
      SESSION_SECRET: secret,
    }),
  );
}

beforeEach(() => withSecret('a'.repeat(32)));

describe('a password', () => {
  it('matches its own hash only, and nothing without one', async () => {
    const hash = await hashPassword('the third dryer hums');
    expect(await passwordMatches('the third dryer hums', hash)).toBe(true);
    expect(await passwordMatches('the third dryer hum', hash)).toBe(false);
    expect(await passwordMatches('the third dryer hums', null)).toBe(false);
  });

  it('counts to its last character, however long, and however an accent was typed', async () => {
    const long = 'x'.repeat(100);
    const hash = await hashPassword(`${long}1`);
    expect(await passwordMatches(`${long}2`, hash)).toBe(false);
    expect(await passwordMatches(`${long}1`, hash)).toBe(true);
    const typed = await hashPassword('caf\u00e9 au lait');
    expect(await passwordMatches('cafe\u0301 au lait', typed)).toBe(true);
  });
});

describe('the secret of a mailed link', () => {
  it('is the same for the same row, another for another purpose, row or installation', () => {
    const id = '01890a5d-ac96-774b-bcce-b302099a8057';
    const token = mailedToken('invitation', id);
    expect(token).toMatch(/^[A-Za-z0-9_-]{43}$/);
    expect(mailedToken('invitation', id)).toBe(token);
    expect(mailedToken('reset_password', id)).not.toBe(token);
    expect(mailedToken('invitation', id.replace('0189', '0190'))).not.toBe(token);
    expect(tokenHash(token)).not.toContain(token);
    withSecret('b'.repeat(32));
    expect(mailedToken('invitation', id)).not.toBe(token);
  });
});

describe('a sealed secret', () => {
  it('is read again here, and nowhere else', () => {
    const sealed = seal('JBSWY3DPEHPK3PXP');
    expect(sealed).not.toContain('JBSWY3DPEHPK3PXP');
    expect(unseal(sealed)).toBe('JBSWY3DPEHPK3PXP');
    expect(seal('JBSWY3DPEHPK3PXP')).not.toBe(sealed);
    withSecret('b'.repeat(32));
    expect(() => unseal(sealed)).toThrow();
  });
});
