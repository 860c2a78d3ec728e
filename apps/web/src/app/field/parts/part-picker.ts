import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  output,
  signal,
} from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { AmountField, ChoiceChips, CountStepper, TextField } from '@lib/ui';
import { debounceTime, distinctUntilChanged, from, of, switchMap } from 'rxjs';
import { type PartSource } from '@lib/contracts/web';
import { type KeptPart } from '../kept/kept';
import { PartBook } from './part-book';

/** A part that was fitted, as the job records it. */
export interface PickedPart {
  readonly partId: string | null;
  readonly description: string;
  readonly unitCost: number | null;
  readonly quantityMilli: number;
  readonly source: PartSource;
}

/** Finds a part in the book, or names one that is not in it; then how many, and from where. */
@Component({
  selector: 'tw-part-picker',
  imports: [
    AmountField,
    ChoiceChips,
    CountStepper,
    MatButton,
    MatFormField,
    MatInput,
    MatLabel,
    ReactiveFormsModule,
    TextField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './part-picker.html',
  styleUrl: './part-picker.scss',
})
export class PartPicker {
  readonly #book = inject(PartBook);
  readonly picked = output<PickedPart>();
  readonly closed = output<void>();

  protected readonly words = signal('');
  protected readonly found = toSignal(
    toObservable(this.words).pipe(
      debounceTime(250),
      distinctUntilChanged(),
      switchMap((words) => (words.trim() ? from(this.#book.find(words.trim())) : of(undefined))),
    ),
  );
  protected readonly part = signal<KeptPart | undefined>(undefined);
  protected readonly outsideBook = signal(false);

  protected readonly form = new FormGroup({
    description: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.maxLength(160)],
    }),
    unitCost: new FormControl<number | null>(null),
    quantity: new FormControl(1, { nonNullable: true }),
    source: new FormControl<PartSource>('van', { nonNullable: true }),
  });
  protected readonly sources = [
    { value: 'van', label: 'van' },
    { value: 'shelf', label: 'shop’s shelf' },
    { value: 'storeroom', label: 'store’s own' },
    { value: 'ordered', label: 'ordered' },
    { value: 'salvaged', label: 'salvaged' },
  ];
  protected readonly naming = computed(() => this.part() !== undefined || this.outsideBook());

  constructor() {
    void this.#book.takeAlong();
  }

  protected search(event: Event): void {
    this.words.set((event.target as HTMLInputElement).value);
  }

  protected choose(part: KeptPart): void {
    this.part.set(part);
    this.form.controls.description.setValue(part.name);
  }

  protected nameOutside(): void {
    this.outsideBook.set(true);
    this.form.controls.description.setValue(this.words().trim());
  }

  protected again(): void {
    this.part.set(undefined);
    this.outsideBook.set(false);
  }

  protected add(): void {
    this.form.markAllAsTouched();
    const { description, unitCost, quantity, source } = this.form.getRawValue();
    if (this.form.invalid || description.trim() === '') return;
    this.picked.emit({
      partId: this.part()?.id ?? null,
      description: description.trim(),
      unitCost: this.part() ? null : unitCost,
      quantityMilli: quantity * 1000,
      source,
    });
  }
}
