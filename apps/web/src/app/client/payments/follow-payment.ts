import { catchError, expand, map, type Observable, of, switchMap, takeWhile, timer } from 'rxjs';
import { type Payment } from './payments-api';

/** Asked often at first, because mostly the word is there at once, and then ever less. */
const pauses = [1_000, 2_000, 3_000, 5_000, 10_000];
const lastPause = 15_000;
/** After so many questions it is left to the server, which asks by itself. */
const mostQuestions = 40;

interface Followed {
  readonly questions: number;
  /** What was answered; nothing when there was no answer. */
  readonly payment?: Payment;
}

/**
 * Asks how a card payment ended until it has ended, or for as long as waiting makes sense.
 *
 * @param check asks once
 */
export function followPayment(check: () => Observable<Payment>): Observable<Followed> {
  const ask = (questions: number): Observable<Followed> =>
    timer(pauses[questions] ?? lastPause).pipe(
      switchMap(() => check().pipe(catchError(() => of(undefined)))),
      map((payment) => ({ questions: questions + 1, ...(payment ? { payment } : {}) })),
    );
  return ask(0).pipe(
    expand(({ questions }) => ask(questions)),
    takeWhile(
      ({ questions, payment }) =>
        questions < mostQuestions && (!payment || payment.state === 'asked'),
      true,
    ),
  );
}
