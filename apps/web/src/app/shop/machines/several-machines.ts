import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  type Choice,
  counted,
  FormNotes,
  LoadNote,
  NumberField,
  PageHead,
  ProgressLine,
  SelectField,
  TextField,
  WordsField,
} from '@lib/ui';
import { startWith } from 'rxjs';
import { problemFrom } from '../../core/api/problem';
import { applyProblem } from '../../core/forms/apply-problem';
import { rulesFor } from '../../core/forms/rules-for';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { StoresApi } from '../stores/stores-api';
import { AddSeveral } from './add-several';
import { bankLetter } from '../stores/bank-letter';
import { baysBetween, serialsByBay } from './bays';
import { modelBody, modelControls } from './machine-fields';
import { ModelFields } from './model-fields';

const newBank = 'new';

/** Adds a row of machines of one model: "bank A, bays 1 to 12". */
@Component({
  selector: 'tw-several-machines',
  imports: [
    FormNotes,
    LoadNote,
    MatButton,
    ModelFields,
    NumberField,
    PageHead,
    ProgressLine,
    ReactiveFormsModule,
    RouterLink,
    SelectField,
    TextField,
    WordsField,
  ],
  providers: [AddSeveral],
  templateUrl: './several-machines.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SeveralMachines implements HasChanges {
  readonly #storesApi = inject(StoresApi);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);
  protected readonly adding = inject(AddSeveral);

  readonly storeId = input.required<string>();

  protected readonly floor = rxResource({
    params: () => this.storeId(),
    stream: ({ params }) => this.#storesApi.floor(params),
  });
  protected readonly bankChoices = computed<readonly Choice[]>(() => {
    const banks = this.floor.hasValue() ? this.floor.value().banks : [];
    return banks.map(({ id, letter, words }) => ({
      value: id,
      label: words ? `${letter}, ${words}` : letter,
    }));
  });
  protected readonly upLink = computed(() => ['/shop/stores', this.storeId()]);
  protected readonly notes = signal<readonly string[]>([]);

  protected readonly form = this.#build.group({
    bankId: [newBank],
    letter: ['', [Validators.required, bankLetter]],
    words: ['', rulesFor('banks.create', 'words')],
    from: [1 as number | null, [Validators.required, Validators.min(1), Validators.max(999)]],
    until: [null as number | null, [Validators.required, Validators.min(1), Validators.max(999)]],
    ...modelControls(),
    serials: [''],
  });
  protected readonly values = toSignal(
    this.form.valueChanges.pipe(startWith(this.form.getRawValue())),
    { requireSync: true },
  );
  protected readonly intoNewBank = computed(() => this.values().bankId === newBank);
  protected readonly bays = computed(() => baysBetween(this.values().from, this.values().until));
  protected readonly buttonWord = computed(() =>
    this.bays().length ? `Add ${counted(this.bays().length, 'machine')}` : 'Add the machines',
  );

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected async add(): Promise<void> {
    if (this.adding.busy()) return;
    this.notes.set([]);
    const { letter } = this.form.controls;
    if (this.intoNewBank()) letter.enable();
    else letter.disable();
    this.form.markAllAsTouched();
    if (this.form.invalid) return;
    if (this.bays().length === 0) {
      this.notes.set(['The last bay comes before the first.']);
      return;
    }
    try {
      await this.#addAll();
    } catch (error) {
      const notes = applyProblem(this.form, problemFrom(error));
      this.notes.set([...notes, ...this.adding.standing()]);
    }
  }

  async #addAll(): Promise<void> {
    const {
      bankId,
      letter,
      words,
      from: _from,
      until: _until,
      serials,
      ...model
    } = this.form.getRawValue();
    const added = await this.adding.run({
      storeId: this.storeId(),
      bank: bankId === newBank ? { letter: letter.toUpperCase(), words } : bankId,
      bays: this.bays(),
      serials: serialsByBay(serials, this.bays()),
      machine: modelBody(model),
    });
    this.form.markAsPristine();
    this.#messages.say(`${counted(added, 'machine')} stand on the floor now.`);
    await this.#router.navigate(this.upLink());
  }
}
