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
import {
  type AbstractControl,
  NonNullableFormBuilder,
  ReactiveFormsModule,
  type ValidationErrors,
} from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { type BodyOf } from '@lib/contracts/web';
import {
  Callout,
  ChoiceChips,
  conditionWords,
  counted,
  dayIn,
  dayText,
  FormNotes,
  labelFor,
  LoadNote,
  PageHead,
  Reading,
  SelectField,
  TextField,
  WordsField,
} from '@lib/ui';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { CallsApi } from '../calls/calls-api';
import { StorePicker } from '../store-picker/store-picker';
import { type StoreSummary, StoresApi } from '../stores/stores-api';
import { clockIn } from './clock-in';
import { crewChoices } from './crew-choices';
import { type Visit, VisitsApi } from './visits-api';

/** Plans a visit for calls or for another reason, or moves one. */
@Component({
  selector: 'tw-visit-form',
  imports: [
    Callout,
    ChoiceChips,
    FormNotes,
    LoadNote,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    SelectField,
    StorePicker,
    TextField,
    WordsField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './visit-form.html',
  styles: `
    tw-callout {
      margin-block-end: 0.75rem;
      max-inline-size: 36rem;
    }
    .window {
      margin: 0;
      color: var(--tw-alarm);
    }
  `,
})
export class VisitForm implements HasChanges {
  readonly #api = inject(VisitsApi);
  readonly #calls = inject(CallsApi);
  readonly #stores = inject(StoresApi);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #router = inject(Router);

  /** Of the address: the visit to change; none for a new one. */
  readonly visitId = input<string>();
  /** Of the address, for a new one: the store, the call it is for, the day it is seen on. */
  readonly storeId = input<string>();
  readonly callId = input<string>();
  readonly on = input<string>();

  protected readonly visit = rxResource({
    params: () => this.visitId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly picked = signal<string | undefined>(undefined);
  readonly #atStore = computed(
    () =>
      (this.visit.hasValue() ? this.visit.value().store.id : undefined) ??
      this.picked() ??
      this.storeId(),
  );
  protected readonly store = rxResource({
    params: () => this.#atStore(),
    stream: ({ params }) => this.#stores.show(params),
  });
  readonly #openCalls = rxResource({
    params: () => this.#atStore(),
    stream: ({ params }) => this.#calls.list({ storeId: params, state: 'open', limit: 100 }),
  });
  protected readonly crew = crewChoices();

  /** Open calls of the store, and those the visit has already. */
  protected readonly callChoices = computed(() => {
    const open = this.#openCalls.hasValue() ? this.#openCalls.value().items : [];
    const own = this.visit.hasValue() ? this.visit.value().callList : [];
    return [...own, ...open].map(({ id, number, machine, symptom, words }) => ({
      value: id,
      label: `${machine?.bay ?? `Call ${number}`}: ${words || labelFor(symptom)}`,
    }));
  });
  protected readonly needsStore = computed(
    () => !this.visitId() && !this.picked() && !this.storeId(),
  );
  protected readonly ready = computed(
    () => this.store.hasValue() && (!this.visitId() || this.visit.hasValue()),
  );
  protected readonly heading = computed(() =>
    this.visit.hasValue() ? `Change visit ${this.visit.value().number}` : 'Plan a visit',
  );
  protected readonly conditions = computed(() =>
    this.store.hasValue() ? this.store.value().conditions.map(conditionWords) : [],
  );
  protected readonly zoneHint = computed(() => {
    const zone = this.store.hasValue() ? this.store.value().zone : null;
    return zone && zone !== this.#reading.zone()
      ? `On the clock of the store: ${zone.replaceAll('_', ' ')}.`
      : undefined;
  });

  protected readonly form = this.#build.group(
    {
      plannedOn: ['', rulesFor('visits.plan', 'plannedOn')],
      from: [''],
      until: [''],
      techMembershipId: [''],
      callIds: [[] as string[]],
      reason: ['', rulesFor('visits.plan', 'reason')],
    },
    { validators: [wholeWindow] },
  );
  readonly #values = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  readonly #day = rxResource({
    params: () => this.#values().plannedOn || undefined,
    stream: ({ params }) => this.#api.daySheet(params),
  });
  /** "Imre has 2 visits on that day already." */
  protected readonly dayWords = computed(() => {
    const techId = this.#values().techMembershipId;
    const tech = this.#day.hasValue()
      ? this.#day.value().techs.find(({ membershipId }) => membershipId === techId)
      : undefined;
    const others = tech?.visits.filter(({ id }) => id !== this.visitId()).length ?? 0;
    return tech && others > 0
      ? `${tech.name} has ${counted(others, 'visit')} on that day already.`
      : '';
  });

  protected readonly saving: Submission<Visit> = submission(this.form, (key) => this.#send(key), {
    done: (visit) => this.#saved(visit),
    refused: (problem) => toldStale(problem, this.visit, this.saving.notes),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      if (!this.form.dirty && this.ready()) this.#fill();
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected pick(store: StoreSummary): void {
    this.picked.set(store.id);
  }

  #zone(): string {
    return (this.store.hasValue() ? this.store.value().zone : null) ?? this.#reading.zone();
  }

  #fill(): void {
    if (!this.visit.hasValue()) {
      const callId = this.callId();
      this.form.patchValue({
        plannedOn: this.on() ?? dayIn(this.#reading.zone(), new Date()),
        callIds: callId ? [callId] : [],
      });
      return;
    }
    const { plannedOn, window, tech, callList, reason } = this.visit.value();
    this.form.reset({
      plannedOn,
      from: window ? clockIn(this.#zone(), window.from) : '',
      until: window ? clockIn(this.#zone(), window.until) : '',
      techMembershipId: tech?.membershipId ?? '',
      callIds: callList.map(({ id }) => id),
      reason,
    });
  }

  #send(key: string) {
    const { plannedOn, from, until, techMembershipId, callIds, reason } = this.form.getRawValue();
    const window = from && until ? { from, until } : null;
    const tech = techMembershipId || null;
    const { controls } = this.form;
    if (!this.visit.hasValue()) {
      const storeId = this.#atStore() ?? '';
      const body = { storeId, plannedOn, window, techMembershipId: tech, callIds, reason };
      return this.#api.plan(body, key);
    }
    // Only what was touched, so that a change made elsewhere meanwhile is not undone.
    const body: BodyOf<'visits.change'> = {
      ...(controls.plannedOn.dirty ? { plannedOn } : {}),
      // A day that moves takes its window along.
      ...(controls.from.dirty || controls.until.dirty || controls.plannedOn.dirty
        ? { window }
        : {}),
      ...(controls.techMembershipId.dirty ? { techMembershipId: tech } : {}),
      ...(controls.callIds.dirty ? { callIds } : {}),
      ...(controls.reason.dirty ? { reason } : {}),
    };
    return this.#api.change(this.visit.value(), body);
  }

  #saved(visit: Visit): void {
    const day = dayText(visit.plannedOn, this.#reading.locale());
    const who = visit.tech ? `for ${visit.tech.name}` : 'and waits for a tech';
    this.#messages.say(
      `Visit ${visit.number} to ${visit.store.name} is planned on ${day}, ${who}.`,
    );
    void this.#router.navigate(['/shop/visits', visit.id]);
  }
}

/** A window has a beginning and an end, in this order; or there is none. */
function wholeWindow(form: AbstractControl): ValidationErrors | null {
  const { from, until } = form.value as { from: string; until: string };
  if (!from && !until) return null;
  if (!from || !until) return { window: 'Give both ends of the window, or neither.' };
  return from < until ? null : { window: 'The window must end after it begins.' };
}
