import { type Observable, of, throwError } from 'rxjs';
import { followPayment } from './follow-payment';
import { type Payment } from './payments-api';

const payment = (state: Payment['state']) => ({ state }) as Payment;

describe('followPayment', () => {
  beforeEach(() => jest.useFakeTimers());
  afterEach(() => jest.useRealTimers());

  function follow(answers: Observable<Payment>[]) {
    const asked = jest.fn(() => answers.shift() ?? of(payment('asked')));
    const states: (string | undefined)[] = [];
    let ended = false;
    const following = followPayment(asked).subscribe({
      next: ({ payment: answer }) => states.push(answer?.state),
      complete: () => (ended = true),
    });
    return { asked, states, following, ended: () => ended };
  }

  it('asks until the payment has ended, also past a question without an answer', async () => {
    const { asked, states, ended } = follow([
      of(payment('asked')),
      throwError(() => new Error('no answer')),
      of(payment('succeeded')),
    ]);
    await jest.advanceTimersByTimeAsync(60_000);
    expect(states).toEqual(['asked', undefined, 'succeeded']);
    expect([asked.mock.calls.length, ended()]).toEqual([3, true]);
  });

  it('gives up after a while, and leaves it to the server', async () => {
    const { asked, ended } = follow([]);
    await jest.advanceTimersByTimeAsync(60 * 60_000);
    expect([asked.mock.calls.length, ended()]).toEqual([40, true]);
  });

  it('stops when nobody looks any more', async () => {
    const { asked, following } = follow([]);
    await jest.advanceTimersByTimeAsync(1_500);
    following.unsubscribe();
    await jest.advanceTimersByTimeAsync(60_000);
    expect(asked).toHaveBeenCalledTimes(1);
  });
});
