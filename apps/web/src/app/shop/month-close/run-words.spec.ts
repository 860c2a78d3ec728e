import { barOf, firstBatchWords, leftWords } from './run-words';

const noMails = { waiting: 0, sent: 0, uncertain: 0, failed: 0, total: 0 };

describe('barOf', () => {
  it('counts what is made until every statement is', () => {
    const counts = { waiting: 2, built: 1, rendered: 5, failed: 0 };
    expect(barOf({ stores: 8, counts, mails: { ...noMails, total: 5, sent: 1 } })).toEqual({
      label: 'Making the statements',
      word: 'made',
      done: 5,
      of: 8,
      aside: undefined,
    });
  });

  it('then counts what is mailed, and says what went wrong beside it', () => {
    const counts = { waiting: 0, built: 0, rendered: 7, failed: 1 };
    const mails = { waiting: 2, sent: 5, uncertain: 1, failed: 1, total: 9 };
    expect(barOf({ stores: 8, counts, mails })).toEqual({
      label: 'Mailing the statements',
      word: 'mailed',
      done: 5,
      of: 9,
      aside: '1 uncertain, 1 not sent, 1 failed',
    });
  });
});

describe('leftWords', () => {
  it('says seconds, then minutes, and nothing when nothing is known', () => {
    expect(leftWords(20)).toBe('about 20 s');
    expect(leftWords(170)).toBe('about 3 min');
    expect(leftWords(null)).toBeUndefined();
  });
});

describe('firstBatchWords', () => {
  it('says how many checks agree', () => {
    const firstChecked = { statements: 3, checks: 15, agree: 15 };
    expect(firstBatchWords({ firstChecked })).toBe(
      'First batch: 3 statements, 15 of 15 checks agree',
    );
  });
});
