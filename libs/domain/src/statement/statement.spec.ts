import * as fc from 'fast-check';
import { lateChargePostings, ticketPostings } from '../ledger/charge-postings';
import { paymentPostings, statementPostings } from '../ledger/settlement-postings';
import { openBalance, trialBalance } from '../ledger/trial-balance';
import {
  type StatedTicket,
  type StatementInput,
  agreesWith,
  buildStatement,
} from './build-statement';
import { canonicalJson } from './canonical-json';
import { checkStatement } from './check-statement';
import { isValidRfReference } from './creditor-reference';
import { type StatementSnapshot } from './snapshot';

const store = { id: 'suds', name: 'Suds on Main' };
const terms = { number: 'S-2026-0142', currency: 'USD', date: '2026-04-01', days: 30 };

function buildTicket(overrides: Partial<StatedTicket> = {}): StatedTicket {
  return {
    id: 't1',
    date: '2026-03-12',
    reference: 'T-0142',
    words: 'Blocked inlet valve cleared; door lock replaced at our cost',
    machines: ['B-07', 'B-09'],
    list: 21400,
    charged: 12650,
    tax: 413,
    total: 13063,
    borneByShop: 8750,
    ...overrides,
  };
}

function buildInput(overrides: Partial<StatementInput> = {}): StatementInput {
  return {
    store,
    period: '2026-03',
    opening: 5000,
    tickets: [buildTicket()],
    fees: [
      { id: 'f1', date: '2026-03-31', reference: 'C-7', words: 'March', charged: 9900, tax: 0 },
    ],
    lateCharges: [],
    creditNotes: [
      { id: 'n1', date: '2026-03-20', reference: 'N-1', words: 'Fuse', charged: 300, tax: 25 },
    ],
    payments: [
      { id: 'p1', date: '2026-03-05', reference: 'P-9', words: 'Card, thank you', amount: 5000 },
    ],
    terms,
    ...overrides,
  };
}

describe('a statement', () => {
  it('foots from opening to closing, line by line', () => {
    const statement = buildStatement(buildInput());
    expect(statement.lines.map(({ date, kind, total }) => [date, kind, total])).toEqual([
      ['2026-03-05', 'payment', -5000],
      ['2026-03-12', 'ticket', 13063],
      ['2026-03-20', 'credit_note', -325],
      ['2026-03-31', 'fee', 9900],
    ]);
    expect(statement.sums).toEqual({
      list: 31300,
      charged: 22550,
      tax: 413,
      total: 22963,
      borneByShop: 8750,
      credited: 325,
      paid: 5000,
    });
    expect(statement.closing).toBe(5000 + 22963 - 325 - 5000);
    expect(statement.dueOn).toBe('2026-05-01');
    expect(isValidRfReference(statement.reference)).toBe(true);
  });

  it('counts refunds and write-offs', () => {
    const money = { date: '2026-03-06', reference: 'R-1', words: 'Paid twice', amount: 700 };
    const statement = buildStatement(
      buildInput({ refunds: [{ id: 'r1', ...money }], writeOffs: [{ id: 'w1', ...money }] }),
    );
    expect(statement.sums).toMatchObject({ paid: 4300, credited: 1025 });
    expect(statement.closing).toBe(5000 + 22963 - 1025 - 4300);
  });

  it('can be empty, and then carries the opening on', () => {
    const nothing = { tickets: [], fees: [], creditNotes: [], payments: [] };
    const statement = buildStatement(buildInput(nothing));
    expect([statement.closing, statement.lines]).toEqual([5000, []]);
  });

  it('refuses a ticket whose total is not its charge plus tax, by however little', () => {
    const tickets = [buildTicket({ total: 13064 })];
    expect(() => buildStatement(buildInput({ tickets }))).toThrow(/S-2026-0142.*total/);
  });

  it('refuses the same ticket twice, a later date, and parts of a cent', () => {
    const twice = [buildTicket(), buildTicket()];
    expect(() => buildStatement(buildInput({ tickets: twice }))).toThrow(/once/);
    const late = [buildTicket({ date: '2026-04-01' })];
    expect(() => buildStatement(buildInput({ tickets: late }))).toThrow(/after the period/);
    const broken = [buildTicket({ charged: 12650.5, total: 13063.5 })];
    expect(() => buildStatement(buildInput({ tickets: broken }))).toThrow(/whole/);
  });

  it('accepts work of an earlier month that was only handed in now', () => {
    const tickets = [buildTicket({ date: '2026-02-27' })];
    expect(buildStatement(buildInput({ tickets })).lines[0]?.date).toBe('2026-02-27');
  });

  it('carries nothing of a ticket but what belongs on it', () => {
    const ticket = { ...buildTicket(), ownCost: 999 };
    const text = canonicalJson(buildStatement(buildInput({ tickets: [ticket] })));
    expect(text).not.toContain('ownCost');
  });
});

describe('the machine check', () => {
  const failing = (snapshot: StatementSnapshot, previous?: { closing: number }) =>
    checkStatement(snapshot, previous).flatMap(({ name, holds }) => (holds ? [] : [name]));
  const good = buildStatement(buildInput());

  it('holds for what was built, and needs the last statement to judge the opening', () => {
    expect(failing(good)).toEqual([]);
    expect(failing(good, { closing: 5000 })).toEqual([]);
    expect(failing(good, { closing: 4999 })).toEqual(['opening']);
  });

  it.each<[string, (copy: StatementSnapshot) => void, string[]]>([
    ['a changed charge', (s) => void (s.lines[1]!.charged += 1), ['line_totals', 'lines_sum']],
    ['a changed tax sum', (s) => void (s.sums.tax += 1), ['tax_sum']],
    ['a changed closing', (s) => void (s.closing -= 1), ['closing']],
    ['a removed line', (s) => void s.lines.splice(0, 1), ['settled_sum', 'closing']],
    ['hidden goodwill', (s) => void (s.sums.borneByShop = 0), ['borne_by_shop_sum']],
    ['a part of a cent', (s) => void (s.sums.list += 0.5), ['whole_amounts', 'lines_sum']],
    [
      'a mistyped reference',
      (s) => void (s.reference = `RF00${s.reference.slice(4)}`),
      ['reference'],
    ],
    ['a due date before its own', (s) => void (s.dueOn = '2026-03-31'), ['dates']],
  ])('finds %s', (_what, tamper, names) => {
    const copy = structuredClone(good);
    tamper(copy);
    expect(failing(copy)).toEqual(names);
  });
});

describe('month after month', () => {
  const cents = fc.integer({ min: 1, max: 500_000 });
  const month = fc.record({
    tickets: fc.array(fc.record({ charged: fc.nat(500_000), tax: fc.nat(40_000) }), {
      maxLength: 6,
    }),
    lateCharges: fc.array(cents, { maxLength: 2 }),
    payments: fc.array(cents, { maxLength: 3 }),
  });

  it('closes with the receivable balance of the ledger and opens the next with it', () => {
    fc.assert(
      fc.property(fc.array(month, { minLength: 1, maxLength: 6 }), (months) => {
        const postings = [];
        let previous: StatementSnapshot | undefined;
        for (const [index, { tickets, lateCharges, payments }] of months.entries()) {
          const period = `2026-0${index + 1}`;
          const facts = (kind: string, n: number) => ({
            id: `${kind}${n}`,
            date: `${period}-15`,
            reference: `${kind}-${n}`,
            words: kind,
          });
          const input = buildInput({
            period,
            opening: previous?.closing ?? 0,
            fees: [],
            creditNotes: [],
            tickets: tickets.map(({ charged, tax }, n) =>
              buildTicket({ ...facts('T', n), charged, tax, total: charged + tax }),
            ),
            lateCharges: lateCharges.map((charged, n) => ({ ...facts('L', n), charged, tax: 0 })),
            payments: payments.map((amount, n) => ({ ...facts('P', n), amount })),
          });
          const statement = buildStatement(input);
          for (const { charged, tax } of tickets) {
            const line = { kind: 'labour', bearer: 'store', charged, ownCost: 0 } as const;
            postings.push(...ticketPostings({ storeId: 'suds', lines: [line], tax }));
          }
          for (const charged of lateCharges)
            postings.push(...lateChargePostings({ storeId: 'suds', charged }));
          for (const amount of payments)
            postings.push(...paymentPostings({ storeId: 'suds', amount, method: 'card' }));
          postings.push(...statementPostings({ storeId: 'suds', amount: statement.sums.total }));
          expect(statement.closing).toBe(openBalance(postings, 'suds'));
          expect(trialBalance(postings).accounts.unbilled).toBe(0);
          expect(agreesWith(statement, previous)).toBe(true);
          previous = statement;
        }
      }),
    );
  });

  it('does not agree with a last statement that closed otherwise', () => {
    expect(agreesWith({ opening: 1 }, undefined)).toBe(false);
    expect(agreesWith({ opening: 1 }, { closing: 2 })).toBe(false);
  });

  it('is the same text whatever order the documents came in', () => {
    const tickets = [1, 2, 3, 4].map((n) => buildTicket({ id: `t${n}`, reference: `T-${n % 2}` }));
    const text = canonicalJson(buildStatement(buildInput({ tickets })));
    fc.assert(
      fc.property(fc.shuffledSubarray(tickets, { minLength: 4 }), (shuffled) => {
        expect(canonicalJson(buildStatement(buildInput({ tickets: shuffled })))).toBe(text);
      }),
    );
  });
});
