import { settledWords } from './settled-words';

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
