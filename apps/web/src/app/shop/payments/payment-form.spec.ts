import { TestBed } from '@angular/core/testing';
import { Problem } from '../../core/api/problem';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { AnsweringApi, onePage } from '../../testing/answering-api';
import { PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { PaymentForm } from './payment-form';

const quay = { id: 's1', name: 'Quay 9', client: { id: 'c1', name: 'Quayside Wash Company' } };
const balance = { storeId: 's1', storeName: 'Quay 9', balance: 50_000, overdue: 20_000 };
const payment = {
  id: 'p1',
  number: 31,
  method: 'transfer',
  amount: 50_000,
  storeName: 'Quay 9',
  allocations: [],
  credit: 0,
  balance: 0,
};

describe('PaymentForm', () => {
  async function opened(recorded: object = payment) {
    const api = AnsweringApi.provide({
      'stores.list': onePage([quay]),
      'balances.list': onePage([balance]),
      'payments.record': recorded,
    });
    const address = '/payments/new?storeId=s1&amount=50000';
    const page = await PageUnderTest.open(PaymentForm, 'payments/new', address);
    TestBed.inject(Session).take(anAnswer());
    await page.rest();
    return { api, page };
  }

  it('begins with the store and amount of the address, and says what is owed', async () => {
    const { api, page } = await opened();
    expect(page.text).toContain('Quay 9 owes £500.00, £200.00 of it overdue.');
    await page.press('Record the payment');
    expect(api.sent('payments.record').map(({ body }) => body)).toEqual([
      expect.objectContaining({ storeId: 's1', amount: 50_000, method: 'transfer', words: '' }),
    ]);
    expect(TestBed.inject(Messages).message()?.text).toContain('P-0031: £500.00 from Quay 9');
    expect(page.address).toBe('/shop/payments/p1');
  });

  it('shows at the field what the server refuses, and keeps what was typed', async () => {
    const errors = [{ pointer: '/receivedOn', detail: 'is in the future' }];
    const refusal = new Problem(
      'invalid-request',
      422,
      'Some fields are not right',
      undefined,
      errors,
    );
    const { api, page } = await opened(refusal);
    await page.fill('Note', 'Cheque 1123');
    await page.press('Record the payment');
    expect(page.text).toContain('Is in the future.');
    expect(page.address).toContain('/payments/new');
    // It is not sent again until the field is changed.
    await page.press('Record the payment');
    expect(api.sent('payments.record')).toHaveLength(1);
  });
});
