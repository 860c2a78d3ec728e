import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  dayIn,
  dayText,
  FormNotes,
  LoadNote,
  PageHead,
  Reading,
  TextField,
  WordsField,
} from '@lib/ui';
import { forkJoin, map, of, switchMap } from 'rxjs';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { bookForm, bookOf, emptyBook } from './book-form';
import { LabourSection } from './labour-section';
import { MarkupSection } from './markup-section';
import { PartNames } from './part-names';
import { type Edition, PriceBookApi } from './price-book-api';
import { TaxesSection } from './taxes-section';
import { TripsSection } from './trips-section';
import { WarrantySection } from './warranty-section';

/** Writes a new edition of the price book, beginning from one that stands. */
@Component({
  selector: 'tw-edition-form',
  imports: [
    FormNotes,
    LabourSection,
    LoadNote,
    MarkupSection,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    TaxesSection,
    TextField,
    TripsSection,
    WarrantySection,
    WordsField,
  ],
  templateUrl: './edition-form.html',
  styles: `
    section {
      padding-block: 1rem;
      border-block-end: 1px solid var(--tw-hairline);
    }
    form {
      max-inline-size: 48rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EditionForm implements HasChanges {
  readonly #api = inject(PriceBookApi);
  readonly #messages = inject(Messages);
  readonly #partNames = inject(PartNames);
  readonly #reading = inject(Reading);
  readonly #router = inject(Router);

  /** Of the address: the edition to begin from; without it, the one in force. */
  readonly from = input<string>();

  protected readonly start = rxResource({
    params: () => ({ from: this.from() }),
    stream: ({ params }) =>
      (params.from ? this.#api.show(params.from) : this.#api.inForce()).pipe(
        switchMap((edition) =>
          forkJoin({
            edition: of(edition),
            names: this.#partNames.of(edition.book.partPrices.map(({ partId }) => partId)),
          }),
        ),
        map(({ edition, names }) => ({ edition, names, book: bookForm(edition.book) })),
      ),
  });
  protected readonly today = computed(() => dayIn(this.#reading.zone(), new Date()));

  protected readonly form = new FormGroup({
    validFrom: new FormControl('', { nonNullable: true, validators: Validators.required }),
    note: new FormControl('', {
      nonNullable: true,
      validators: rulesFor('editions.create', 'note'),
    }),
    book: bookForm(emptyBook),
  });

  protected readonly saving = submission(
    this.form,
    (key) =>
      this.#api.create({ ...this.form.getRawValue(), book: bookOf(this.form.controls.book) }, key),
    { done: (edition) => this.#saved(edition) },
  );

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      if (!this.start.hasValue() || this.form.dirty) return;
      this.form.setControl('book', this.start.value().book);
      if (!this.form.controls.validFrom.value) {
        this.form.controls.validFrom.setValue(this.today());
      }
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  #saved(edition: Edition): void {
    const day = dayText(edition.validFrom, this.#reading.locale());
    this.#messages.say(`Edition ${edition.number} holds from ${day}. Tickets that stand are kept.`);
    void this.#router.navigate(['/shop/price-book', edition.id]);
  }
}
