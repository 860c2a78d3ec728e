import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  AmountField,
  CheckField,
  FormNotes,
  LoadNote,
  NumberField,
  PageHead,
  PercentField,
  TextField,
  WordsField,
} from '@lib/ui';
import { changedValues } from '../../core/forms/changed-values';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { PriceBookApi } from '../price-book/price-book-api';
import { type Client, ClientsApi } from './clients-api';
import { bookHints } from './book-hints';

/** Adds a client, or changes one. */
@Component({
  selector: 'tw-client-form',
  imports: [
    AmountField,
    CheckField,
    FormNotes,
    LoadNote,
    MatButton,
    NumberField,
    PageHead,
    PercentField,
    ReactiveFormsModule,
    RouterLink,
    TextField,
    WordsField,
  ],
  templateUrl: './client-form.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClientForm implements HasChanges {
  readonly #api = inject(ClientsApi);
  readonly #book = inject(PriceBookApi);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);

  /** Of the address; none for a new client. */
  readonly clientId = input<string>();

  protected readonly client = rxResource({
    params: () => this.clientId(),
    stream: ({ params }) => this.#api.show(params),
  });
  readonly #inForce = rxResource({ stream: () => this.#book.inForce() });
  protected readonly hints = bookHints(() =>
    this.#inForce.hasValue() ? this.#inForce.value().book : undefined,
  );
  protected readonly ready = computed(() => !this.clientId() || this.client.hasValue());
  protected readonly heading = computed(() =>
    this.client.hasValue() ? `Change ${this.client.value().name}` : 'Add a client',
  );
  protected readonly upLink = computed(() => ['/shop/clients', this.clientId() ?? '']);

  protected readonly form = this.#build.group({
    name: ['', rulesFor('clients.create', 'name')],
    number: ['', rulesFor('clients.create', 'number')],
    termsDays: [null as number | null, rulesFor('clients.create', 'termsDays')],
    taxExempt: [false],
    taxExemptReference: ['', rulesFor('clients.create', 'taxExemptReference')],
    overrides: this.#build.group({
      normalPerHour: [null as number | null],
      afterHoursPerHour: [null as number | null],
      tripAmount: [null as number | null],
      markupBasisPoints: [null as number | null],
      discountBasisPoints: [null as number | null],
    }),
    note: ['', rulesFor('clients.create', 'note')],
  });

  protected readonly saving: Submission<Client> = submission(this.form, (key) => this.#send(key), {
    done: (client) => this.#saved(client),
    refused: (problem) => toldStale(problem, this.client, this.saving.notes),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      if (this.client.hasValue() && !this.form.dirty) this.#fill(this.client.value());
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  #fill(client: Client): void {
    this.form.reset({
      ...client,
      overrides: client.overrides ?? {},
      note: client.note ?? '',
    });
  }

  #send(key: string) {
    if (this.client.hasValue()) {
      return this.#api.change(this.client.value(), changedValues(this.form));
    }
    const { number, ...rest } = this.form.getRawValue();
    return this.#api.create({ ...rest, ...(number ? { number } : {}) }, key);
  }

  #saved(client: Client): void {
    this.#messages.say(
      this.clientId() ? `${client.name} was changed.` : `${client.name} is a client now.`,
    );
    void this.#router.navigate(['/shop/clients', client.id]);
  }
}
