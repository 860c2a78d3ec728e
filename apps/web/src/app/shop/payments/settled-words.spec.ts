import { owedWords, settledWords } from './settled-words';

const money = (amount: number) => `$${(amount / 100).toFixed(2)}`;
const part = (statementName: string, amount: number) => ({
  statementId: statementName,
  statementName,
  month: '2031-04',
  amount,
});
const payment = { storeName: 'Quay 9', amount: 50_000, credit: 0, balance: 2_000 };

describe('settledWords', () => {
  it('says what it went to and what is still owed', () => {
    const allocations = [part('S-0020', 30_000), part('S-0028', 20_000)];
    expect(settledWords({ ...payment, allocations }, money)).toBe(
      '$500.00 from Quay 9 went to S-0020 and S-0028. It still owes $20.00.',
    );
  });

  it('says what is kept for later', () => {
    const more = { ...payment, credit: 1_000, balance: -1_000 };
    expect(settledWords({ ...more, allocations: [part('S-0020', 49_000)] }, money)).toBe(
      '$500.00 from Quay 9 went to S-0020, and $10.00 is kept as a credit. It owes nothing now.',
    );
    expect(settledWords({ ...more, allocations: [] }, money)).toContain('is kept as a credit.');
  });
});

describe('owedWords', () => {
  const quay = { storeName: 'Quay 9', balance: 50_000, overdue: 0 };

  it('says how much, and how much of it is late', () => {
    expect(owedWords(quay, money)).toBe('Quay 9 owes $500.00, none of it overdue.');
    expect(owedWords({ ...quay, overdue: 20_000 }, money)).toContain('$200.00 of it overdue.');
    expect(owedWords({ ...quay, overdue: 50_000 }, money)).toContain('all of it overdue.');
  });

  it('says what becomes of money nobody owes', () => {
    expect(owedWords({ ...quay, balance: 0 }, money)).toContain('kept as a credit');
  });
});
