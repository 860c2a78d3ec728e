import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  untracked,
} from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  AmountField,
  type Choice,
  ChoiceChips,
  dayIn,
  FormNotes,
  PageHead,
  Reading,
  SelectField,
  TextField,
} from '@lib/ui';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { moneyWords } from '../money/money-words';
import { StoreChoices } from '../stores/store-choices';
import { nameOf } from './payment-words';
import { type Payment, PaymentsApi, type StoreBalance } from './payments-api';
import { owedWords, settledWords } from './settled-words';

type Method = 'transfer' | 'cheque' | 'cash';
const methods: readonly Choice<Method>[] = [
  { value: 'transfer', label: 'Transfer' },
  { value: 'cheque', label: 'Cheque' },
  { value: 'cash', label: 'Cash' },
];

/** Writes down money that came without a card. */
@Component({
  selector: 'tw-payment-form',
  imports: [
    AmountField,
    ChoiceChips,
    FormNotes,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    SelectField,
    TextField,
  ],
  templateUrl: './payment-form.html',
  styles: `
    .owed {
      margin: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PaymentForm implements HasChanges {
  readonly #api = inject(PaymentsApi);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #router = inject(Router);
  readonly #money = moneyWords();

  /** Of the address: the store and amount of the statement one came from. */
  readonly storeId = input<string>();
  readonly amount = input<string>();

  protected readonly methods = methods;
  protected readonly stores = inject(StoreChoices).current();
  protected readonly form = inject(NonNullableFormBuilder).group({
    storeId: ['', Validators.required],
    method: ['transfer' as Method],
    amount: [
      null as number | null,
      [Validators.required, ...rulesFor('payments.record', 'amount')],
    ],
    receivedOn: [dayIn(this.#reading.zone(), new Date()), Validators.required],
    words: ['', rulesFor('payments.record', 'words')],
  });
  readonly #chosen = toSignal(this.form.controls.storeId.valueChanges, { initialValue: '' });
  readonly #balance = rxResource({
    params: () => this.#chosen() || undefined,
    stream: ({ params }) => this.#api.balanceOf(params),
  });
  protected readonly owed = computed(() =>
    this.#balance.hasValue() ? this.#balance.value() : undefined,
  );

  protected readonly saving = submission(this.form, (key) => this.#send(key), {
    done: (payment) => this.#saved(payment),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      // The store can be shown as chosen only once it is among the options.
      const storeId = this.stores().length ? this.storeId() : undefined;
      const amount = Number(this.amount());
      if (!storeId || untracked(() => this.form.dirty)) return;
      this.form.patchValue({ storeId, amount: Number.isSafeInteger(amount) ? amount : null });
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected owedWords(store: StoreBalance): string {
    return owedWords(store, this.#money);
  }

  protected takeAll(amount: number): void {
    this.form.controls.amount.setValue(amount);
    this.form.controls.amount.markAsDirty();
  }

  #send(key: string) {
    const { amount, ...rest } = this.form.getRawValue();
    return this.#api.record({ ...rest, amount: amount ?? 0 }, key);
  }

  #saved(payment: Payment): void {
    this.#messages.say(`${nameOf(payment)}: ${settledWords(payment, this.#money)}`);
    void this.#router.navigate(['/shop/payments', payment.id]);
  }
}
