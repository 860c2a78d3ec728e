import {
  ChangeDetectionStrategy,
  Component,
  inject,
  input,
  type OnInit,
  output,
} from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { FormNotes, TextField } from '@lib/ui';
import { type Observable } from 'rxjs';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { bankLetter } from './bank-letter';
import { type Bank, StoresApi } from './stores-api';

@Component({
  selector: 'tw-bank-form',
  imports: [FormNotes, MatButton, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <div class="beside">
        <tw-text-field
          label="Letter"
          [control]="form.controls.letter"
          [hint]="bank() ? 'The bays of its machines change with it' : 'A, B, or two letters'"
        />
        <tw-text-field
          label="Known as"
          [control]="form.controls.words"
          hint="By the window, back wall"
        />
      </div>
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
          {{ bank() ? 'Save the bank' : 'Add the bank' }}
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Cancel</button>
      </div>
    </form>
  `,
})
export class BankForm implements OnInit {
  readonly #api = inject(StoresApi);
  readonly #build = inject(NonNullableFormBuilder);

  readonly storeId = input.required<string>();
  readonly bank = input<Bank>();
  readonly saved = output<void>();
  readonly closed = output<void>();

  protected readonly form = this.#build.group({
    letter: ['', [Validators.required, bankLetter]],
    words: ['', rulesFor('banks.create', 'words')],
  });
  protected readonly saving = submission(this.form, (key) => this.#send(key), {
    done: () => this.saved.emit(),
  });

  constructor() {
    inject(OpenForms).follow(this.form);
  }

  ngOnInit(): void {
    const bank = this.bank();
    if (bank) this.form.reset({ letter: bank.letter, words: bank.words });
  }

  #send(key: string): Observable<unknown> {
    const body = this.form.getRawValue();
    const bank = this.bank();
    return bank ? this.#api.changeBank(bank, body) : this.#api.addBank(this.storeId(), body, key);
  }
}
