import { FormControl, FormGroup, Validators } from '@angular/forms';
import { causes, findingCodes, warrantyMarks } from '@lib/contracts/generated/values';
import { choicesOf, labelFor, wordFor } from '@lib/ui';
import { type JobValues } from './job-values';

export type JobForm = FormGroup<{ [K in keyof JobValues]: FormControl<JobValues[K]> }>;

/** Written, not chosen: recorded when the field is left, not while a word is half written. */
export const written: ReadonlySet<keyof JobValues> = new Set([
  'category',
  'finding',
  'action',
  'amount',
  'markWords',
]);

/** What only somebody who took the covers off can say. */
export const behindCovers = ['code', 'category', 'finding', 'action'] as const;

export function jobForm({ ...values }: JobValues): JobForm {
  const text = (value: string, longest: number) =>
    new FormControl(value, { nonNullable: true, validators: [Validators.maxLength(longest)] });
  const count = (value: number, most: number) =>
    new FormControl(value, { nonNullable: true, validators: [Validators.max(most)] });
  return new FormGroup({
    code: new FormControl(values.code),
    category: text(values.category, 40),
    finding: text(values.finding, 1000),
    cause: new FormControl(values.cause),
    action: text(values.action, 1000),
    minutes: count(values.minutes, 1440),
    afterHoursMinutes: count(values.afterHoursMinutes, 1440),
    accessMinutes: count(values.accessMinutes, 1440),
    cycles: count(values.cycles, 1000),
    coins: count(values.coins, 1000),
    amount: new FormControl(values.amount),
    mark: new FormControl(values.mark, { nonNullable: true }),
    markWords: text(values.markWords, 500),
    causedByJobId: new FormControl(values.causedByJobId),
  });
}

/** Shown before the others are asked for. */
export const commonCodes = 6;
export const codeChoices = choicesOf(findingCodes, wordFor);

/** Where nothing was found, the finding says so: no cause is asked for. */
export const causeChoices = choicesOf(
  causes.filter((value) => value !== 'nothing_found'),
  wordFor,
);

export const markChoices = warrantyMarks.map((value) => ({
  value,
  label: value === 'none' ? 'No' : labelFor(value),
}));
