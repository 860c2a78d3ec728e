import { balanceRows } from './balance-rows';
import { type Statement } from './statements-api';

type Line = Statement['lines'][number];

function line(facts: Partial<Line>): Line {
  return {
    kind: 'ticket',
    id: 'l',
    date: '2031-05-06',
    reference: '',
    words: '',
    machines: [],
    list: 0,
    charged: 0,
    tax: 0,
    total: 0,
    borneByShop: 0,
    ...facts,
  };
}

describe('balanceRows', () => {
  it('add up from the balance before to the balance after', () => {
    const statement = {
      opening: 12000,
      closing: 36140,
      lines: [
        line({ kind: 'payment', words: 'Paid by card', reference: 'P-0011', total: -12000 }),
        line({ charged: 20000, tax: 140, total: 20140 }),
        line({ charged: 9000, tax: 0, total: 9000 }),
        line({ kind: 'fee', words: 'Care, May', total: 7000, charged: 7000 }),
      ],
    } as Statement;
    const rows = balanceRows(statement);
    expect(rows.map(({ words, amount }) => [words, amount])).toEqual([
      ['Balance before', 12000],
      ['Visits of the month', 29000],
      ['Tax on them', 140],
      ['Paid by card, P-0011', -12000],
      ['Care, May', 7000],
      ['Balance', 36140],
    ]);
    const changes = rows.slice(0, -1).reduce((sum, { amount }) => sum + amount, 0);
    expect(changes).toBe(statement.closing);
  });

  it('name only what there is', () => {
    const rows = balanceRows({ opening: 0, closing: 0, lines: [] as Line[] } as Statement);
    expect(rows.map(({ words }) => words)).toEqual(['Balance before', 'Balance']);
  });
});
