import { symptoms } from '@lib/contracts/generated/values';
import { type Symptom } from '@lib/contracts/web';
import { type Choice, labelFor } from '@lib/ui';

/** What a caller can report, before anybody has looked. */
export const symptomChoices: readonly Choice<Symptom>[] = symptoms.map((value) => ({
  value,
  label: labelFor(value),
}));
