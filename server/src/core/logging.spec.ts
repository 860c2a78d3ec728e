import { UniqueConstraintError } from 'sequelize';
import { plainError } from './logging';

const secrets = ['ada@pendle.example', 'Ada Pendle', 'insert into'];

function written(error: unknown): string {
  const text = JSON.stringify(plainError(error));
  for (const secret of secrets) expect(text).not.toContain(secret);
  return text;
}

describe('an error in the log', () => {
  it('of the database is told without the statement and its values', () => {
    const parent = Object.assign(new Error('duplicate key value violates unique constraint'), {
      code: '23505',
      constraint: 'users_email_key',
      detail: 'Key (email)=(ada@pendle.example) already exists.',
      sql: 'insert into users (email, name) values ($1, $2)',
      parameters: ['ada@pendle.example', 'Ada Pendle'],
    });
    const text = written(new UniqueConstraintError({ parent, fields: { email: secrets[0] } }));
    expect(text).toContain('23505');
    expect(text).toContain('users_email_key');
    expect(text).toContain('logging.spec.ts');
  });

  it('of the mail server is told without the address, also where that is the cause', () => {
    const refusal = Object.assign(new Error('550 5.1.1 <ada@pendle.example>: unknown'), {
      code: 'EENVELOPE',
      rejected: ['ada@pendle.example'],
    });
    expect(written(refusal)).toContain('550 5.1.1 <(an address)>: unknown');
    expect(written(new Error('not sent', { cause: refusal }))).toContain('EENVELOPE');
  });

  it('may be anything', () => {
    expect(plainError('ada@pendle.example').message).toBe('something that is no error was thrown');
  });
});
