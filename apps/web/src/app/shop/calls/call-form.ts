import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
} from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { type Symptom } from '@lib/contracts/web';
import {
  Callout,
  ChoiceChips,
  FormNotes,
  InstantPipe,
  LabelPipe,
  LoadNote,
  PageHead,
  TextField,
  WordsField,
} from '@lib/ui';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { ContactsApi } from '../contacts/contacts-api';
import { StorePicker } from '../store-picker/store-picker';
import { type StoreSummary, StoresApi } from '../stores/stores-api';
import { type Call, CallsApi } from './calls-api';
import { MachineChoice } from './machine-choice';
import { symptomChoices } from './symptoms';

/** Writes down what somebody rings about: where, which machine, what it does, in whose words. */
@Component({
  selector: 'tw-call-form',
  imports: [
    Callout,
    ChoiceChips,
    FormNotes,
    InstantPipe,
    LabelPipe,
    LoadNote,
    MachineChoice,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    StorePicker,
    TextField,
    WordsField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './call-form.html',
  styles: `
    .wide {
      max-inline-size: 48rem;
    }
    .problem {
      margin: 0;
      color: var(--tw-alarm);
    }
  `,
})
export class CallForm implements HasChanges {
  readonly #api = inject(CallsApi);
  readonly #contacts = inject(ContactsApi);
  readonly #stores = inject(StoresApi);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);

  /** Of the address: from the page of a store or a machine. */
  readonly storeId = input<string>();
  readonly machineId = input<string>();

  protected readonly picked = signal<string | undefined>(undefined);
  protected readonly store = rxResource({
    params: () => this.picked() ?? this.storeId(),
    stream: ({ params }) => this.#stores.show(params),
  });
  readonly #people = rxResource({
    params: () => this.picked() ?? this.storeId(),
    stream: ({ params }) => this.#contacts.list({ storeId: params, limit: 50 }),
  });
  readonly #live = rxResource({
    params: () => this.picked() ?? this.storeId(),
    stream: ({ params }) => this.#api.list({ storeId: params, state: 'live', limit: 100 }),
  });

  protected readonly symptoms = symptomChoices;
  protected readonly callers = computed(() =>
    this.#people.hasValue() ? this.#people.value().items.map(({ name }) => name) : [],
  );
  protected readonly form = this.#build.group({
    machineId: [null as string | null],
    symptom: [null as Symptom | null, rulesFor('calls.report', 'symptom')],
    words: ['', rulesFor('calls.report', 'words')],
    reportedBy: ['', rulesFor('calls.report', 'reportedBy')],
  });
  readonly #values = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  /** Calls for the same machine that nobody has worked off yet. */
  protected readonly standing = computed(() => {
    const machineId = this.#values().machineId;
    const live = this.#live.hasValue() ? this.#live.value().items : [];
    return machineId ? live.filter(({ machine }) => machine?.id === machineId) : [];
  });

  protected readonly saving: Submission<Call> = submission(this.form, (key) => this.#send(key), {
    done: (call) => this.#taken(call),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      const machineId = this.machineId();
      if (machineId && this.form.pristine) this.form.controls.machineId.setValue(machineId);
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected pick(store: StoreSummary): void {
    this.picked.set(store.id);
    this.form.controls.machineId.setValue(null);
  }

  protected choose(machineId: string | null): void {
    this.form.controls.machineId.setValue(machineId);
    this.form.controls.machineId.markAsDirty();
  }

  #send(key: string) {
    const { symptom, machineId, words, reportedBy } = this.form.getRawValue();
    const storeId = this.picked() ?? this.storeId() ?? '';
    return this.#api.report(
      {
        storeId,
        machineId,
        symptom: symptom as Symptom,
        words,
        ...(reportedBy.trim() ? { reportedBy } : {}),
      },
      key,
    );
  }

  #taken(call: Call): void {
    const where = call.machine ? `${call.store.name}, ${call.machine.bay}` : call.store.name;
    this.#messages.say(`Call ${call.number} for ${where} is written down.`);
    void this.#router.navigate(['/shop/calls', call.id]);
  }
}
