import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** What the server refused and no field carries, above the form. Always there, so it is read out. */
@Component({
  selector: 'tw-form-notes',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div role="alert">
      @for (note of notes(); track note) {
        <p>{{ note }}</p>
      }
    </div>
  `,
  styles: `
    p {
      margin: 0 0 1rem;
      padding: 0.625rem 0.875rem;
      border-inline-start: 4px solid var(--tw-alarm);
      background: var(--tw-alarm-wash);
    }
  `,
})
export class FormNotes {
  readonly notes = input.required<readonly string[]>();
}
