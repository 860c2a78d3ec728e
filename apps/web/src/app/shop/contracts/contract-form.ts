import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  AmountField,
  CheckField,
  type Choice,
  ChoiceChips,
  ChoiceFilter,
  dayIn,
  FieldError,
  FormNotes,
  LoadNote,
  PageHead,
  Reading,
  SelectField,
  TextField,
} from '@lib/ui';
import { startWith } from 'rxjs';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { ClientChoices } from '../clients/client-choices';
import { CrewApi } from '../crew/crew-api';
import { monthsLater } from '../month-close/months';
import { StoreChoices } from '../stores/store-choices';
import { contractForm, kinds, shifts, termsOf } from './contract-terms';
import { type Contract, ContractsApi } from './contracts-api';
import { RuleFields } from './rule-fields';
import { RulePreview } from './rule-preview';

/** Agrees a maintenance contract, or changes one. */
@Component({
  selector: 'tw-contract-form',
  imports: [
    AmountField,
    CheckField,
    ChoiceChips,
    ChoiceFilter,
    FieldError,
    FormNotes,
    LoadNote,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    RuleFields,
    RulePreview,
    SelectField,
    TextField,
  ],
  templateUrl: './contract-form.html',
  styles: `
    h2 {
      margin: 1rem 0 0;
    }
    .hint {
      margin: 0;
    }
    .alarm {
      margin: 0;
      color: var(--tw-alarm);
      font-size: 0.875rem;
    }
    .store {
      display: grid;
      grid-template-columns: minmax(0, 1fr) auto;
      align-items: center;
      gap: 0.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ContractForm implements HasChanges {
  readonly #api = inject(ContractsApi);
  readonly #crew = inject(CrewApi);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);
  readonly #storeChoices = inject(StoreChoices);

  /** Of the address; none for a new contract. */
  readonly contractId = input<string>();

  protected readonly kinds = kinds;
  protected readonly shifts = shifts;
  protected readonly form = contractForm(inject(NonNullableFormBuilder), this.#firstOfNext());
  protected readonly stores = this.form.controls.stores;

  protected readonly contract = rxResource({
    params: () => this.contractId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly ready = computed(() => !this.contractId() || this.contract.hasValue());
  protected readonly heading = computed(() =>
    this.contract.hasValue() ? `Change ${this.contract.value().name}` : 'Agree a contract',
  );
  protected readonly upLink = computed(() => ['/shop/contracts', this.contractId() ?? '']);

  protected readonly clients = inject(ClientChoices).current();
  readonly #techs = rxResource({ stream: () => this.#crew.list({ role: 'tech', limit: 100 }) });
  protected readonly techs = computed<readonly Choice[]>(() =>
    this.#techs.hasValue()
      ? this.#techs.value().items.map(({ id, name }) => ({ value: id, label: name }))
      : [],
  );

  readonly #values = toSignal(this.form.valueChanges.pipe(startWith(null)), { initialValue: null });
  /** What of the form the preview depends on. */
  protected readonly asked = computed(
    () => {
      this.#values();
      const { rule, startsOn, endsOn, shift } = this.form.getRawValue();
      return { rule, startsOn, endsOn: endsOn || null, shift };
    },
    { equal: (a, b) => JSON.stringify(a) === JSON.stringify(b) },
  );
  protected readonly clientId = computed(() => {
    this.#values();
    return this.contract.hasValue()
      ? this.contract.value().clientId
      : this.form.controls.clientId.value;
  });
  readonly #clientStores = rxResource({
    params: () => this.clientId() || undefined,
    stream: ({ params }) => this.#storeChoices.all(params),
  });
  readonly #names = computed(() => {
    const own = this.#clientStores.hasValue() ? this.#clientStores.value() : [];
    const agreed = this.contract.hasValue() ? this.contract.value().storeList : [];
    return new Map([
      ...agreed.map(({ storeId, storeName }) => [storeId, storeName] as const),
      ...own.map(({ id, name }) => [id, name] as const),
    ]);
  });
  protected readonly addable = computed<readonly Choice[]>(() => {
    this.#values();
    const chosen = new Set(this.stores.getRawValue().map(({ storeId }) => storeId));
    const own = this.#clientStores.hasValue() ? this.#clientStores.value() : [];
    return own
      .filter(({ id }) => !chosen.has(id))
      .map(({ id, name }) => ({ value: id, label: name }));
  });

  protected readonly saving: Submission<Contract> = submission(
    this.form,
    (key) => this.#send(key),
    {
      done: (contract) => this.#saved(contract),
      refused: (problem) => toldStale(problem, this.contract, this.saving.notes),
    },
  );

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      if (!this.contract.hasValue() || this.form.dirty) return;
      const { storeList, endsOn, techMembershipId, ...rest } = this.contract.value();
      this.form.fillStores(storeList);
      this.form.reset({
        ...rest,
        endsOn: endsOn ?? '',
        techMembershipId: techMembershipId ?? '',
        stores: storeList,
      });
    });
    effect(() => {
      // Stores of another client would be refused.
      this.clientId();
      if (!this.contractId()) this.form.fillStores([]);
    });
  }

  /** Contracts begin with a month, as their fees do. */
  #firstOfNext(): string {
    const month = dayIn(inject(Reading).zone(), new Date()).slice(0, 7);
    return `${monthsLater(month, 1)}-01`;
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected storeName(storeId: string): string {
    return this.#names().get(storeId) ?? 'Store';
  }

  protected addStore(storeId: string): void {
    if (!storeId) return;
    this.form.addStore(storeId, null);
    this.stores.markAsDirty();
  }

  protected removeStore(index: number): void {
    this.stores.removeAt(index);
    this.stores.markAsDirty();
  }

  #send(key: string) {
    const terms = termsOf(this.form.getRawValue());
    if (this.contract.hasValue()) return this.#api.change(this.contract.value(), terms);
    return this.#api.create({ ...terms, clientId: this.clientId() }, key);
  }

  #saved(contract: Contract): void {
    this.#messages.say(
      this.contractId()
        ? `${contract.name} was changed. Rounds that were planned before stay.`
        : `${contract.name} is agreed: rounds come ${contract.ruleWords}.`,
    );
    void this.#router.navigate(['/shop/contracts', contract.id]);
  }
}
