import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  type Choice,
  FormNotes,
  LoadNote,
  NumberField,
  PageHead,
  SelectField,
  TextField,
  WordsField,
} from '@lib/ui';
import { changedValues } from '../../core/forms/changed-values';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { StoresApi } from '../stores/stores-api';
import { modelBody, modelControls } from './machine-fields';
import { type Machine, MachinesApi } from './machines-api';
import { ModelFields } from './model-fields';

/** Adds a machine to a store, or changes what is known of one. */
@Component({
  selector: 'tw-machine-form',
  imports: [
    FormNotes,
    LoadNote,
    MatButton,
    ModelFields,
    NumberField,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    SelectField,
    TextField,
    WordsField,
  ],
  templateUrl: './machine-form.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MachineForm implements HasChanges {
  readonly #api = inject(MachinesApi);
  readonly #storesApi = inject(StoresApi);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);

  /** Of the address: the machine to change, or the store of a new one. */
  readonly machineId = input<string>();
  readonly storeId = input<string>();

  protected readonly machine = rxResource({
    params: () => this.machineId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly floor = rxResource({
    params: () => this.storeId(),
    stream: ({ params }) => this.#storesApi.floor(params),
  });
  protected readonly loading = computed(() => (this.machineId() ? this.machine : this.floor));
  protected readonly ready = computed(() => this.machine.hasValue() || this.floor.hasValue());
  protected readonly heading = computed(() => {
    if (this.machine.hasValue()) {
      const { bay, store } = this.machine.value();
      return `Change ${bay} of ${store.name}`;
    }
    return this.floor.hasValue()
      ? `Add a machine to ${this.floor.value().store.name}`
      : 'Add a machine';
  });
  protected readonly upLink = computed(() =>
    this.machineId() ? ['/shop/machines', this.machineId()] : ['/shop/stores', this.storeId()],
  );
  protected readonly bankChoices = computed<readonly Choice[]>(() =>
    this.floor.hasValue()
      ? this.floor.value().banks.map(({ id, letter, words }) => ({
          value: id,
          label: words ? `${letter}, ${words}` : letter,
        }))
      : [],
  );

  protected readonly form = this.#build.group({
    bankId: ['', Validators.required],
    bayNumber: [null as number | null, rulesFor('machines.create', 'bayNumber')],
    ...modelControls(),
    serial: ['', rulesFor('machines.create', 'serial')],
    note: ['', rulesFor('machines.create', 'note')],
  });

  protected readonly saving: Submission<Machine> = submission(this.form, (key) => this.#send(key), {
    done: (machine) => this.#saved(machine),
    refused: (problem) => toldStale(problem, this.machine, this.saving.notes),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      if (this.form.dirty) return;
      const { bankId, bayNumber } = this.form.controls;
      if (this.machine.hasValue()) {
        this.#fill(this.machine.value());
        // Where a machine stands is changed by moving it, not here.
        bankId.disable();
        bayNumber.disable();
      } else if (this.bankChoices().length === 1) {
        bankId.setValue(this.bankChoices()[0]?.value ?? '');
      }
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  #fill(machine: Machine): void {
    this.form.reset({
      ...machine,
      bankId: machine.bank.id,
      builtOn: machine.builtOn ?? '',
      installedOn: machine.installedOn ?? '',
      supplierWarrantyUntil: machine.supplierWarrantyUntil ?? '',
      note: machine.note ?? '',
    });
  }

  #send(key: string) {
    if (this.machine.hasValue()) {
      const { bankId: _bank, bayNumber: _bay, ...changed } = changedValues(this.form);
      return this.#api.change(this.machine.value(), modelBody(changed));
    }
    const { bayNumber, ...rest } = this.form.getRawValue();
    return this.#api.create({ ...modelBody(rest), ...(bayNumber ? { bayNumber } : {}) }, key);
  }

  #saved(machine: Machine): void {
    this.#messages.say(
      this.machineId()
        ? `${machine.bay} of ${machine.store.name} was changed.`
        : `${machine.bay} stands on the floor of ${machine.store.name}.`,
    );
    void this.#router.navigate(this.upLink());
  }
}
