import { type DeliveryState } from '@lib/contracts/web';

const states: Record<DeliveryState, string> = {
  waiting: 'waits to be sent',
  handing_over: 'is being handed over',
  sent: 'sent',
  failed: 'could not be sent',
  uncertain: 'uncertain: the answer was lost',
};

export function deliveryWords(state: DeliveryState): string {
  return states[state];
}

/** Whether a person has to say what happens to it. */
export function waitsForDecision(state: DeliveryState): boolean {
  return state === 'uncertain' || state === 'failed';
}
