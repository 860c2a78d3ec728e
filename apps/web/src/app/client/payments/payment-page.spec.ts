import { PageUnderTest } from '../../testing/page';
import { PaymentPage } from './payment-page';
import { type Payment } from './payments-api';

function payment(facts: Partial<Payment>): Payment {
  return {
    id: 'p1',
    number: null,
    clientId: 'c1',
    clientName: 'Quayside Wash Company',
    storeId: 's1',
    storeName: 'Quay 9',
    method: 'card',
    state: 'asked',
    amount: 38140,
    currency: 'USD',
    receivedOn: null,
    statementId: 't1',
    words: '',
    problem: null,
    refunded: 0,
    createdAt: '2031-06-02T10:00:00Z',
    version: 1,
    allocations: [],
    credit: 0,
    balance: 38140,
    refunds: [],
    ...facts,
  };
}

const paid = payment({
  state: 'succeeded',
  receivedOn: '2031-06-02',
  balance: 0,
  allocations: [{ statementId: 't1', statementName: 'S-0142', month: '2031-05', amount: 38140 }],
});

const path = 'client/payments/:paymentId';
const first = 1_100;

function passed(milliseconds: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, milliseconds));
}

describe('PaymentPage', () => {
  it('follows a payment after the card page until the balance is paid', async () => {
    const page = await PageUnderTest.open(PaymentPage, path, '/client/payments/p1');
    await page.answer('/api/payments/p1', payment({}));
    expect(page.text).toContain('Waiting for the word of the card service');
    await passed(first);
    await page.answer('/api/payments/p1/check', paid);
    expect(page.text).toContain('Quay 9 owes');
    expect(page.text).toContain('$0.00');
    expect(page.text).toContain('May 2031, S-0142');
    page.server.verify();
  });

  it('asks nothing when the person turned back, and offers to pay after all', async () => {
    const page = await PageUnderTest.open(PaymentPage, path, '/client/payments/p1?cancelled=1');
    await page.answer('/api/payments/p1', payment({}));
    expect(page.text).toContain('You turned back: nothing was paid');
    await passed(first);
    page.server.expectNone('/api/payments/p1/check');
  });

  it('says what the card service said of a card that was refused', async () => {
    const page = await PageUnderTest.open(PaymentPage, path, '/client/payments/p1');
    await page.answer('/api/payments/p1', payment({ state: 'failed', problem: 'Out of funds.' }));
    expect(page.text).toContain('The card was refused');
    expect(page.text).toContain('Out of funds.');
  });
});
