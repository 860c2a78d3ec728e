import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  signal,
} from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { type Symptom } from '@lib/contracts/web';
import { symptomWords } from '@lib/domain/words/symptoms';
import { type Choice, ChoiceChips } from '@lib/ui/choices/choice-chips';
import { WordsField } from '@lib/ui/fields/words-field';
import { floorOf } from '@lib/ui/floor/floor-of';
import { FloorPlan } from '@lib/ui/floor/floor-plan';
import { Reading } from '@lib/ui/format/reading';
import { PageHead } from '@lib/ui/head/page-head';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { LoadNote } from '@lib/ui/notes/load-note';
import { labelFor } from '@lib/ui/words/words';
import { from, map, switchMap } from 'rxjs';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { FloorsApi } from '../floors/floors-api';
import { type CallPhoto, CallsApi } from './calls-api';
import { PhotoPicker } from './photo-picker';
import { notArrived, SendPhotos } from './send-photos';

/** A fault as somebody beside the machine tells it: point at the machine, say what is wrong. */
@Component({
  selector: 'tw-report-page',
  imports: [
    ChoiceChips,
    FloorPlan,
    FormNotes,
    LoadNote,
    MatButton,
    PageHead,
    PhotoPicker,
    ReactiveFormsModule,
    RouterLink,
    WordsField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './report-page.html',
  styles: `
    .tw-form {
      max-inline-size: 44rem;
      gap: 1.25rem;
    }
    @media (max-width: 40rem) {
      tw-floor {
        --tw-glyph: 2.25rem;
      }
    }
    .question {
      margin: 0 0 0.375rem;
      font-weight: 500;
    }
    .chosen {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0 0.5rem;
      min-block-size: 2.5rem;
      margin: 0;
    }
    .error {
      margin: 0.375rem 0 0;
      color: var(--tw-alarm);
    }
  `,
})
export class ReportPage implements HasChanges {
  readonly #api = inject(CallsApi);
  readonly #floors = inject(FloorsApi);
  readonly #messages = inject(Messages);
  readonly #photos = inject(SendPhotos);
  readonly #reading = inject(Reading);
  readonly #router = inject(Router);
  /** A link from a machine or a store names it: `?store=...&machine=...`. */
  readonly #asked = inject(ActivatedRoute).snapshot.queryParamMap;

  protected readonly form = inject(NonNullableFormBuilder).group({
    storeId: [this.#asked.get('store') ?? '', Validators.required],
    machineId: [this.#asked.get('machine') ?? ''],
    symptom: ['' as Symptom | '', rulesFor('calls.report', 'symptom')],
    words: ['', rulesFor('calls.report', 'words')],
  });
  protected readonly photos = signal<readonly CallPhoto[]>([]);
  protected readonly symptoms: readonly Choice[] = Object.keys(symptomWords).map((value) => ({
    value,
    label: value === 'other' ? 'Something else' : labelFor(value),
  }));

  protected readonly stores = rxResource({ stream: () => this.#floors.stores({ limit: 100 }) });
  protected readonly storeChoices = computed<readonly Choice[]>(() =>
    this.stores.hasValue()
      ? this.stores.value().items.map(({ id, name }) => ({ value: id, label: name }))
      : [],
  );

  protected readonly storeId = toSignal(this.form.controls.storeId.valueChanges, {
    initialValue: this.form.controls.storeId.value,
  });
  protected readonly floor = rxResource({
    params: () => this.storeId() || undefined,
    stream: ({ params }) => this.#floors.floor(params),
  });
  protected readonly banks = computed(() =>
    this.floor.hasValue()
      ? floorOf(this.floor.value(), {
          locale: this.#reading.locale(),
          zone: this.#reading.zone(),
        })
      : [],
  );
  readonly #machineId = toSignal(this.form.controls.machineId.valueChanges, {
    initialValue: this.form.controls.machineId.value,
  });
  protected readonly chosen = computed(() => (this.#machineId() ? [this.#machineId()] : []));
  protected readonly machine = computed(() =>
    this.banks()
      .flatMap(({ bays }) => bays)
      .find(({ id }) => id === this.#machineId()),
  );

  protected readonly sending = submission(this.form, (key) => this.#send(key), {
    done: ({ call, failed }) => {
      const where = [call.store.name, call.machine?.bay].filter(Boolean).join(', ');
      const missing = failed.length > 0 ? ` ${notArrived(failed.length)}` : '';
      this.#messages.say(`Call ${call.number} for ${where} is with the shop.${missing}`);
      this.photos.set([]);
      void this.#router.navigate(['/client/calls', call.id], { replaceUrl: true });
    },
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      const [only, second] = this.storeChoices();
      if (only && !second) this.form.controls.storeId.setValue(only.value);
    });
    effect(() => {
      // A machine of another store than the one chosen now.
      if (this.floor.hasValue() && this.#machineId() && !this.machine()) this.choose([]);
    });
  }

  hasChanges(): boolean {
    return this.form.dirty || this.photos().length > 0;
  }

  protected choose(chosen: readonly string[]): void {
    const { machineId } = this.form.controls;
    machineId.setValue(chosen[0] ?? '');
    if (chosen.length > 0) machineId.markAsDirty();
  }

  #send(key: string) {
    const { storeId, machineId, symptom, words } = this.form.getRawValue();
    const report = {
      storeId,
      machineId: machineId || null,
      // The form does not come here without a symptom.
      symptom: symptom as Symptom,
      words,
    };
    return this.#api
      .report(report, key)
      .pipe(
        switchMap((call) =>
          from(this.#photos.send(call.id, this.photos())).pipe(map((failed) => ({ call, failed }))),
        ),
      );
  }
}
