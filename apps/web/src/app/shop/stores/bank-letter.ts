import { type ValidatorFn } from '@angular/forms';

/** One or two letters, in either case: the server writes them large. */
export const bankLetter: ValidatorFn = ({ value }) =>
  !value || /^[a-z]{1,2}$/i.test(String(value).trim())
    ? null
    : { letter: 'Write one letter, or two.' };
