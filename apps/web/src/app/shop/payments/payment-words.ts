import { paymentName } from '@lib/domain/words/document-name';
import { type PaymentItem, type PaymentMethod, type PaymentState } from './payments-api';

const methods: Record<PaymentMethod, string> = {
  card: 'by card',
  transfer: 'by transfer',
  cheque: 'by cheque',
  cash: 'in cash',
};

const states: Record<PaymentState, string> = {
  asked: 'begun, not paid',
  succeeded: 'received',
  failed: 'failed',
  expired: 'not paid in time',
};

export function methodWords(method: PaymentMethod): string {
  return methods[method];
}

export function paymentStateWords(state: PaymentState): string {
  return states[state];
}

/** A card payment that was begun has no number until the money is there. */
export function nameOf({ number, method }: Pick<PaymentItem, 'number' | 'method'>): string {
  return number === null ? `${methodWords(method)}, no number yet` : paymentName(number);
}
