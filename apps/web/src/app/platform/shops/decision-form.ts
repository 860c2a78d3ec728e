import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Callout, FormNotes, WordsField } from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { PlatformApi, type Shop } from '../platform-api';
import { type Consequence, type Decision } from './shop-words';

/** Pausing, resuming or ending: what it means stands above the button that does it. */
@Component({
  selector: 'tw-decision-form',
  imports: [Callout, FormNotes, MatButton, ReactiveFormsModule, WordsField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form tw-sheet" novalidate [formGroup]="form" (ngSubmit)="deciding.submit()">
      <h2>{{ consequence().heading }}</h2>
      <tw-callout [tone]="consequence().destructive ? 'alarm' : 'plain'">
        {{ consequence().words }}
      </tw-callout>
      <tw-form-notes [notes]="deciding.notes()" />
      <tw-words-field
        label="Why"
        [rows]="2"
        [control]="form.controls.note"
        hint="Stands in the history, which the shop reads too."
      />
      <div class="actions">
        <button
          matButton="filled"
          type="submit"
          [class.tw-destructive]="consequence().destructive"
          [disabled]="deciding.busy()"
          disabledInteractive
        >
          {{ consequence().action }}
        </button>
        <button matButton="outlined" type="button" (click)="given.emit()">Leave it as it is</button>
      </div>
    </form>
  `,
  styles: `
    h2 {
      margin: 0;
    }
  `,
})
export class DecisionForm {
  readonly #api = inject(PlatformApi);

  readonly shop = input.required<Shop>();
  readonly decision = input.required<Decision>();
  readonly consequence = input.required<Consequence>();
  readonly decided = output<Shop>();
  readonly given = output<void>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    note: ['', rulesFor('platform.pause', 'note')],
  });
  protected readonly deciding = submission(this.form, () => this.#send(), {
    done: (shop) => this.decided.emit(shop),
  });

  constructor() {
    inject(OpenForms).follow(this.form);
  }

  #send() {
    return this.#api[this.decision()](this.shop().id, this.form.getRawValue().note);
  }
}
