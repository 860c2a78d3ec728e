import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { AmountField, CheckField, FormNotes, LoadNote, PageHead, TextField } from '@lib/ui';
import { changedValues } from '../../core/forms/changed-values';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { PartPicker } from './part-picker';
import { type Part, PartsApi } from './parts-api';

/** Adds a part, or changes one. */
@Component({
  selector: 'tw-part-form',
  imports: [
    AmountField,
    CheckField,
    FormNotes,
    LoadNote,
    MatButton,
    PageHead,
    PartPicker,
    ReactiveFormsModule,
    RouterLink,
    TextField,
  ],
  templateUrl: './part-form.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PartForm implements HasChanges {
  readonly #api = inject(PartsApi);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);

  /** Of the address; none for a new part. */
  readonly partId = input<string>();

  protected readonly part = rxResource({
    params: () => this.partId(),
    stream: ({ params }) => this.#api.show(params),
  });
  readonly #inUse = rxResource({ stream: () => this.#api.categories() });
  protected readonly categories = computed(() =>
    this.#inUse.hasValue() ? this.#inUse.value().items : [],
  );
  protected readonly ready = computed(() => !this.partId() || this.part.hasValue());
  protected readonly heading = computed(() =>
    this.part.hasValue() ? `Change ${this.part.value().number}` : 'Add a part',
  );
  protected readonly upLink = computed(() => ['/shop/parts', this.partId() ?? '']);
  /** What took the part's place, by its name. */
  protected readonly successor = signal<string | undefined>(undefined);

  protected readonly form = this.#build.group({
    number: ['', rulesFor('parts.create', 'number')],
    name: ['', rulesFor('parts.create', 'name')],
    category: ['', rulesFor('parts.create', 'category')],
    supplier: ['', rulesFor('parts.create', 'supplier')],
    unitCost: [
      null as number | null,
      [Validators.required, ...rulesFor('parts.create', 'unitCost')],
    ],
    fixedPrice: [null as number | null, rulesFor('parts.create', 'fixedPrice')],
    makersPart: [true],
    scarce: [false],
    supersededBy: [null as string | null],
  });

  protected readonly saving: Submission<Part> = submission(this.form, (key) => this.#send(key), {
    done: (part) => this.#saved(part),
    refused: (problem) => toldStale(problem, this.part, this.saving.notes),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      if (!this.part.hasValue() || this.form.dirty) return;
      const part = this.part.value();
      this.form.reset(part);
      this.successor.set(part.successor ? `${part.successor.number}, ${part.successor.name}` : '');
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected supersede(by: Part | undefined): void {
    const { supersededBy } = this.form.controls;
    supersededBy.setValue(by?.id ?? null);
    supersededBy.markAsDirty();
    this.successor.set(by && `${by.number}, ${by.name}`);
  }

  #send(key: string) {
    if (this.part.hasValue()) {
      const { unitCost, ...changed } = changedValues(this.form);
      return this.#api.change(this.part.value(), {
        ...changed,
        ...(unitCost == null ? {} : { unitCost }),
      });
    }
    const { unitCost, ...rest } = this.form.getRawValue();
    return this.#api.create({ ...rest, unitCost: unitCost ?? 0 }, key);
  }

  #saved(part: Part): void {
    this.#messages.say(
      this.partId()
        ? `${part.number} was changed. What was fitted before keeps its price.`
        : `${part.number}, ${part.name}, is in your parts now.`,
    );
    void this.#router.navigate(['/shop/parts', part.id]);
  }
}
