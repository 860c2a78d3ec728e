import { type Symptom } from '@lib/contracts/web';
import { type Choice, labelFor } from '@lib/ui';

const symptoms: readonly Symptom[] = [
  'wont_start',
  'wont_fill',
  'wont_drain',
  'wont_heat',
  'wont_turn',
  'wont_spin',
  'wont_lock',
  'wont_open',
  'stops_midway',
  'leaks',
  'noisy',
  'smells',
  'takes_no_payment',
  'shows_error',
  'damaged',
  'other',
];

/** What a caller can report, before anybody has looked. */
export const symptomChoices: readonly Choice<Symptom>[] = symptoms.map((value) => ({
  value,
  label: labelFor(value),
}));
