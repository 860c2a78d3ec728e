import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { type Choice, FormNotes, NumberField, SelectField } from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { StoresApi } from '../stores/stores-api';
import { type Machine, MachinesApi } from './machines-api';

/** Moves a machine to another bay, of its store or of another one of the client. */
@Component({
  selector: 'tw-move-form',
  imports: [FormNotes, MatButton, NumberField, ReactiveFormsModule, SelectField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <tw-select-field
        label="To the store"
        none="Choose the store"
        [options]="storeChoices()"
        [control]="form.controls.storeId"
      />
      <div class="beside">
        <tw-select-field
          label="Bank"
          none="Choose the bank"
          [options]="bankChoices()"
          [control]="form.controls.bankId"
        />
        <tw-number-field label="Bay" [control]="form.controls.bayNumber" />
      </div>
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
          Move it
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Cancel</button>
      </div>
    </form>
  `,
})
export class MoveForm {
  readonly #api = inject(MachinesApi);
  readonly #stores = inject(StoresApi);
  readonly #build = inject(NonNullableFormBuilder);

  readonly machine = input.required<Machine>();
  readonly saved = output<Machine>();
  /** Somebody else changed the machine meanwhile: it should be loaded anew. */
  readonly stale = output<void>();
  readonly closed = output<void>();

  protected readonly form = this.#build.group({
    storeId: ['', Validators.required],
    bankId: ['', Validators.required],
    bayNumber: [
      null as number | null,
      [Validators.required, ...rulesFor('machines.move', 'bayNumber')],
    ],
  });
  readonly #storeId = toSignal(this.form.controls.storeId.valueChanges, { initialValue: '' });

  readonly #storesOfClient = rxResource({
    params: () => this.machine().client.id,
    stream: ({ params }) => this.#stores.list({ clientId: params, limit: 100 }),
  });
  readonly #floor = rxResource({
    params: () => this.#storeId() || undefined,
    stream: ({ params }) => this.#stores.floor(params),
  });
  protected readonly storeChoices = computed<readonly Choice[]>(() =>
    this.#storesOfClient.hasValue()
      ? this.#storesOfClient.value().items.map(({ id, name }) => ({ value: id, label: name }))
      : [],
  );
  protected readonly bankChoices = computed<readonly Choice[]>(() =>
    this.#floor.hasValue()
      ? this.#floor.value().banks.map(({ id, letter, words }) => ({
          value: id,
          label: words ? `${letter}, ${words}` : letter,
        }))
      : [],
  );

  protected readonly saving: Submission<Machine> = submission(
    this.form,
    () => {
      const { bankId, bayNumber } = this.form.getRawValue();
      return this.#api.move(this.machine(), { bankId, bayNumber: bayNumber ?? 1 });
    },
    {
      done: (machine) => this.saved.emit(machine),
      refused: (problem) =>
        toldStale(problem, { reload: () => this.stale.emit() }, this.saving.notes),
    },
  );

  constructor() {
    inject(OpenForms).follow(this.form);
  }
}
