import { symptoms } from '@lib/contracts/generated/values';
import { choicesOf } from '@lib/ui';

/** What a caller can report, before anybody has looked. */
export const symptomChoices = choicesOf(symptoms);
