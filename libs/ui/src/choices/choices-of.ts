import { labelFor } from '../words/words';
import { type Choice } from './choice-chips';

/** Values of an enumeration to choose from, each under its label. */
export function choicesOf<T extends string>(
  values: readonly T[],
  label: (value: T) => string = labelFor,
): readonly Choice<T>[] {
  return values.map((value) => ({ value, label: label(value) }));
}
