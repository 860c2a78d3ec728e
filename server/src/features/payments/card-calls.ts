import Stripe from 'stripe';
import { Problem, problem } from '../../core/problems/problem';

/** Runs a call to the card payment service; its refusals become problems people can act on. */
export async function callCardService<T>(call: () => Promise<T>): Promise<T> {
  try {
    return await call();
  } catch (error) {
    throw cardProblem(error);
  }
}

function cardProblem(error: unknown): unknown {
  if (error instanceof Problem || !(error instanceof Stripe.errors.StripeError)) return error;
  if (error.code === 'amount_too_small') {
    return problem('conflict', 'The amount is too small to be paid by card.');
  }
  if (error.code === 'amount_too_large') {
    return problem('conflict', 'The amount is too large to be paid by card at once.');
  }
  return problem('card-payment-failed');
}
