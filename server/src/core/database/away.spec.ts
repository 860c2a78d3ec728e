import { createLog } from '../logging';
import { databaseIsAway, whenDatabaseAnswers } from './away';

const crashed = Object.assign(new Error('x'), {
  name: 'SequelizeDatabaseError',
  original: { code: '57P02' },
});

describe('a database that is away', () => {
  it('is told by codes of the server, of the network, and by lost connections', () => {
    expect(databaseIsAway(crashed)).toBe(true);
    expect(databaseIsAway(Object.assign(new Error('x'), { code: 'ECONNREFUSED' }))).toBe(true);
    expect(databaseIsAway({ name: 'SequelizeConnectionRefusedError' })).toBe(true);
    expect(databaseIsAway({ original: new Error('Connection terminated unexpectedly') })).toBe(
      true,
    );
    expect(databaseIsAway({ original: { code: '23505' } })).toBe(false);
    expect(databaseIsAway(new RangeError('does not foot'))).toBe(false);
  });

  it('is waited for, but not when something else is wrong', async () => {
    const log = createLog('silent', 'test');
    const work = jest.fn().mockRejectedValueOnce(crashed).mockResolvedValue('there');
    await expect(whenDatabaseAnswers(log, work)).resolves.toBe('there');
    const wrong = jest.fn().mockRejectedValue(new Error('password authentication failed'));
    await expect(whenDatabaseAnswers(log, wrong)).rejects.toThrow('password');
    expect(wrong).toHaveBeenCalledTimes(1);
  });
});
