import { wordFor } from '@lib/ui/words/words';
import { type CallItem } from './calls-api';

type Fault = Pick<CallItem, 'machine' | 'symptom' | 'words'>;

/** What is reported: the symptom, or what was written where none fits. */
export function symptomText({ symptom, words }: Pick<Fault, 'symptom' | 'words'>): string {
  return symptom === 'other' && words ? words : wordFor(symptom);
}

/** "A-03 won’t drain" as a heading: "A-03: won’t drain". */
export function faultText(fault: Fault): string {
  const what = symptomText(fault);
  return fault.machine
    ? `${fault.machine.bay}: ${what}`
    : `${what.charAt(0).toUpperCase()}${what.slice(1)}`;
}
