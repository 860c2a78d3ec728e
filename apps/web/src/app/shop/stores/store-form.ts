import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  AmountField,
  type Choice,
  DistanceField,
  FormNotes,
  LoadNote,
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
import { Session } from '../../core/session/session';
import { ClientChoices } from '../clients/client-choices';
import { PriceBookApi } from '../price-book/price-book-api';
import { type Store, StoresApi } from './stores-api';

/** Adds a store to a client, or changes one. */
@Component({
  selector: 'tw-store-form',
  imports: [
    AmountField,
    DistanceField,
    FormNotes,
    LoadNote,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    SelectField,
    TextField,
    WordsField,
  ],
  templateUrl: './store-form.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StoreForm implements HasChanges {
  readonly #api = inject(StoresApi);
  readonly #book = inject(PriceBookApi);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);
  readonly #shop = inject(Session).shop;

  /** Of the address; none for a new store. */
  readonly storeId = input<string>();
  /** Of the address: the client a new store is for. */
  readonly client = input<string>();

  protected readonly store = rxResource({
    params: () => this.storeId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly clients = inject(ClientChoices).current();
  readonly #inForce = rxResource({ stream: () => this.#book.inForce() });

  protected readonly ready = computed(() => !this.storeId() || this.store.hasValue());
  protected readonly heading = computed(() =>
    this.store.hasValue() ? `Change ${this.store.value().name}` : 'Add a store',
  );
  protected readonly upLink = computed(() => {
    if (this.storeId()) return ['/shop/stores', this.storeId()];
    return this.client() ? ['/shop/clients', this.client()] : ['/shop/stores'];
  });
  protected readonly zones: readonly Choice[] = Intl.supportedValuesOf('timeZone').map((zone) => ({
    value: zone,
    label: zone.replaceAll('_', ' '),
  }));
  protected readonly shopZone = computed(() => {
    const zone = this.#shop()?.zone.replaceAll('_', ' ');
    return zone ? `As the shop: ${zone}` : 'As the shop';
  });
  /** Places the price book names, so that tax and trip rules find the store. */
  protected readonly taxPlaces = computed(() => distinct(this.#rates().map((rate) => rate.place)));
  protected readonly tripPlaces = computed(() => distinct(this.#trips().map((trip) => trip.zone)));

  protected readonly form = this.#build.group({
    clientId: ['', Validators.required],
    name: ['', rulesFor('stores.create', 'name')],
    number: ['', rulesFor('stores.create', 'number')],
    address: ['', rulesFor('stores.create', 'address')],
    hours: ['', rulesFor('stores.create', 'hours')],
    accessWords: ['', rulesFor('stores.create', 'accessWords')],
    zone: [''],
    taxPlace: ['', rulesFor('stores.create', 'taxPlace')],
    tripPlace: ['', rulesFor('stores.create', 'tripPlace')],
    tripMetres: [null as number | null, rulesFor('stores.create', 'tripMetres')],
    cardValue: [0 as number | null, rulesFor('stores.create', 'cardValue')],
  });

  protected readonly saving: Submission<Store> = submission(this.form, (key) => this.#send(key), {
    done: (store) => this.#saved(store),
    refused: (problem) => toldStale(problem, this.store, this.saving.notes),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      if (this.form.dirty) return;
      if (this.store.hasValue()) this.#fill(this.store.value());
      else this.form.controls.clientId.setValue(this.client() ?? '');
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  #rates() {
    return this.#inForce.hasValue() ? this.#inForce.value().book.taxes.rates : [];
  }

  #trips() {
    return this.#inForce.hasValue() ? this.#inForce.value().book.trips : [];
  }

  #fill(store: Store): void {
    this.form.reset({ ...store, clientId: store.client.id, zone: store.zone ?? '' });
  }

  #send(key: string) {
    if (this.store.hasValue()) {
      const { clientId: _client, zone, cardValue, ...changed } = changedValues(this.form);
      return this.#api.change(this.store.value(), {
        ...changed,
        ...(zone === undefined ? {} : { zone: zone || null }),
        ...(cardValue === undefined ? {} : { cardValue: cardValue ?? 0 }),
      });
    }
    const { number, zone, cardValue, ...rest } = this.form.getRawValue();
    const body = { ...rest, zone: zone || null, cardValue: cardValue ?? 0 };
    return this.#api.create({ ...body, ...(number ? { number } : {}) }, key);
  }

  #saved(store: Store): void {
    this.#messages.say(
      this.storeId()
        ? `${store.name} was changed.`
        : `${store.name} stands. Add its machines next.`,
    );
    void this.#router.navigate(['/shop/stores', store.id]);
  }
}

function distinct(places: readonly (string | null | undefined)[]): string[] {
  return [...new Set(places.filter((place) => !!place))] as string[];
}
