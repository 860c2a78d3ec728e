import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { type AbstractControl, type ValidationErrors } from '@angular/forms';
import { map, startWith, switchMap } from 'rxjs';

/** What is wrong with a value, in words; '' when nothing is. A validator may bring its own words. */
export function errorText(errors: ValidationErrors | null): string {
  const first = Object.entries(errors ?? {})[0];
  if (!first) return '';
  const [rule, found] = first as [string, unknown];
  if (typeof found === 'string') return sentence(found);
  const limits = (typeof found === 'object' ? found : {}) as Record<string, unknown>;
  switch (rule) {
    case 'required':
      return 'Fill this in.';
    case 'email':
      return 'Write an address like name@example.com.';
    case 'minlength':
      return `Write at least ${limits['requiredLength']} characters.`;
    case 'maxlength':
      return `Write at most ${limits['requiredLength']} characters.`;
    case 'min':
      return `At least ${limits['min']}.`;
    case 'max':
      return `At most ${limits['max']}.`;
    default:
      return 'This is not in the form that is expected.';
  }
}

function sentence(text: string): string {
  const begun = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.!?]$/.test(begun) ? begun : `${begun}.`;
}

/** The error of a control: `<mat-error><tw-field-error [control]="form.controls.name" /></mat-error>`. */
@Component({
  selector: 'tw-field-error',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `{{ text() }}`,
})
export class FieldError {
  readonly control = input.required<AbstractControl>();

  protected readonly text = toSignal(
    toObservable(this.control).pipe(
      switchMap((control) =>
        control.events.pipe(
          startWith(null),
          map(() => errorText(control.errors)),
        ),
      ),
    ),
    { initialValue: '' },
  );
}
