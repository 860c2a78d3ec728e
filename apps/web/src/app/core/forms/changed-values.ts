import { type AbstractControl, type FormGroup } from '@angular/forms';

type RawValues<C extends Record<string, AbstractControl>> = {
  [K in keyof C]: ReturnType<C[K]['getRawValue']>;
};

/**
 * Only what the person changed, so that a change made by somebody else to another field of the same
 * thing is not undone by saving.
 */
export function changedValues<C extends Record<string, AbstractControl>>(
  group: FormGroup<C>,
): Partial<RawValues<C>> {
  const changed = Object.entries(group.controls).filter(([, control]) => control.dirty);
  return Object.fromEntries(
    changed.map(([name, control]) => [name, control.getRawValue() as unknown]),
  ) as Partial<RawValues<C>>;
}
