import { invalid } from './errors';

/** What becomes of a charge on a card; the numbers and names are those of Stripe's test cards. */
export interface TestCard {
  brand: string;
  last4: string;
  /** Why a charge fails, if it does. */
  refusal?: { code: string; decline_code?: string; message: string };
}

function declined(declineCode: string, message: string): TestCard['refusal'] {
  return { code: 'card_declined', decline_code: declineCode, message };
}

const byNumber: Record<string, Omit<TestCard, 'last4'>> = {
  '4242424242424242': { brand: 'visa' },
  '5555555555554444': { brand: 'mastercard' },
  '378282246310005': { brand: 'amex' },
  '4000000000000002': {
    brand: 'visa',
    refusal: declined('generic_decline', 'Your card was declined.'),
  },
  '4000000000009995': {
    brand: 'visa',
    refusal: declined('insufficient_funds', 'Your card has insufficient funds.'),
  },
  // Can be kept on file, but every charge is declined: for subscriptions that fall past due.
  '4000000000000341': {
    brand: 'visa',
    refusal: declined('generic_decline', 'Your card was declined.'),
  },
  '4000000000000069': {
    brand: 'visa',
    refusal: { code: 'expired_card', message: 'Your card has expired.' },
  },
  '4000000000000127': {
    brand: 'visa',
    refusal: { code: 'incorrect_cvc', message: "Your card's security code is incorrect." },
  },
  '4000000000000119': {
    brand: 'visa',
    refusal: {
      code: 'processing_error',
      message: 'An error occurred while processing your card. Try again in a little bit.',
    },
  },
};

const numberByName: Record<string, string> = {
  pm_card_visa: '4242424242424242',
  pm_card_mastercard: '5555555555554444',
  pm_card_amex: '378282246310005',
  pm_card_chargeDeclined: '4000000000000002',
  pm_card_visa_chargeDeclined: '4000000000000002',
  pm_card_chargeDeclinedInsufficientFunds: '4000000000009995',
  pm_card_visa_chargeDeclinedInsufficientFunds: '4000000000009995',
  pm_card_chargeCustomerFail: '4000000000000341',
};

/** The number behind one of the ready-made payment methods, such as `pm_card_visa`. */
export function numberOf(paymentMethodName: string): string | undefined {
  return numberByName[paymentMethodName];
}

/** Only test cards are known, so that nobody can leave a real one here by mistake. */
export function testCard(number: string): TestCard {
  const digits = number.replace(/[\s-]/g, '');
  const card = byNumber[digits];
  if (!card) {
    throw invalid(
      'This fake takes test cards only, for example 4242 4242 4242 4242.',
      'incorrect_number',
      'number',
    );
  }
  return { ...card, last4: digits.slice(-4) };
}
