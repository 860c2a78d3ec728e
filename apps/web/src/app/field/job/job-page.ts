import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  effect,
  inject,
  input,
  linkedSignal,
  signal,
  untracked,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { type JobResult } from '@lib/contracts/web';
import {
  AmountField,
  Callout,
  ChoiceChips,
  CountStepper,
  labelFor,
  PageHead,
  TextField,
  wordFor,
  WordsField,
} from '@lib/ui';
import { debounceTime } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { type SheetJob } from '../kept/kept';
import { OutboxLine } from '../outbox/outbox-line';
import { PartBook } from '../parts/part-book';
import { FieldVisit } from '../sheets/field-visit';
import { conditionWords } from '../visit/condition-words';
import { workMinutes } from '../visit/work-minutes';
import { BecauseOf } from './because-of';
import { JobCautions } from './job-cautions';
import {
  behindCovers,
  causeChoices,
  codeChoices,
  commonCodes,
  jobForm,
  markChoices,
  written,
} from './job-form';
import { JobParts } from './job-parts';
import { JobPhotos } from './job-photos';
import { entriesFor, jobValues, type JobValues } from './job-values';
import { LeftAs } from './left-as';
import { type LeftState, missingFrom, resultsFor } from './leaving';

const names = Object.keys as (values: JobValues) => (keyof JobValues)[];
/** Taps that belong together, as several on a stepper, are one act. */
const settling = 700;

/** One job, for one thumb: everything entered is kept at once, there is nothing to save. */
@Component({
  selector: 'tw-job-page',
  imports: [
    AmountField,
    BecauseOf,
    Callout,
    ChoiceChips,
    CountStepper,
    JobCautions,
    JobParts,
    JobPhotos,
    LeftAs,
    MatButton,
    OutboxLine,
    PageHead,
    ReactiveFormsModule,
    TextField,
    WordsField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './job-page.html',
  styleUrl: './job-page.scss',
  host: { '(focusout)': 'commitAll()', '(document:visibilitychange)': 'commitAll()' },
})
export class JobPage {
  readonly #router = inject(Router);
  readonly #confirm = inject(Confirm);
  readonly #messages = inject(Messages);
  readonly #book = inject(PartBook);
  readonly #titles = inject(Titles);
  protected readonly visit = inject(FieldVisit);
  readonly jobId = input.required<string>();

  protected readonly job = computed<SheetJob | undefined>(() =>
    this.visit.sheet()?.jobs.find(({ id }) => id === this.jobId()),
  );
  readonly #values = computed(() => {
    const job = this.job();
    return job && jobValues(job);
  });
  /** Made once for each job; afterwards it follows what others record. */
  protected readonly form = linkedSignal({
    source: () => (this.job() ? this.jobId() : undefined),
    computation: (id) => (id ? jobForm(untracked(this.#values) as JobValues) : undefined),
  });
  protected readonly values = signal<JobValues | undefined>(undefined);

  protected readonly closed = this.visit.closed;
  protected readonly locked = computed(() => !this.job()?.shop?.cautionsAt);
  protected readonly heading = computed(() => {
    const machine = this.job()?.machine;
    return machine ? machine.bay : 'Job';
  });
  protected readonly sub = computed(() => {
    const job = this.job();
    if (!job) return '';
    const { make, model, kind } = job.machine;
    const known = [`${make} ${model}`.trim() || labelFor(kind)];
    if (job.symptom) known.push(wordFor(job.symptom));
    return known.join(', ');
  });
  protected readonly conditions = computed(() => {
    const machineId = this.job()?.machine.id;
    return (this.visit.sheet()?.conditions ?? [])
      .filter(({ machine }) => machine?.id === machineId)
      .map(conditionWords);
  });
  protected readonly call = computed(() => {
    const callId = this.job()?.callId;
    return this.visit.sheet()?.calls.find(({ id }) => id === callId);
  });
  protected readonly cardValue = computed(() => this.visit.sheet()?.store.cardValue ?? 0);

  protected readonly allCodes = signal(false);
  protected readonly codes = computed(() => {
    const chosen = codeChoices.findIndex(({ value }) => value === this.values()?.code);
    const all = this.allCodes() || chosen >= commonCodes;
    return all ? codeChoices : codeChoices.slice(0, commonCodes);
  });
  protected readonly causes = causeChoices;
  protected readonly marks = markChoices;
  protected readonly categories = computed(() =>
    [...new Set(this.#book.kept().map(({ category }) => category))].sort(),
  );
  protected readonly suggested = computed(() => {
    const sheet = this.visit.sheet();
    return sheet && !this.job()?.shop?.minutes ? workMinutes(sheet, new Date()) : 0;
  });
  protected readonly usualAccess = computed(() => {
    const machineId = this.job()?.machine.id;
    return (this.visit.sheet()?.conditions ?? [])
      .filter(({ machine }) => !machine || machine.id === machineId)
      .reduce((sum, { extraMinutes }) => sum + extraMinutes, 0);
  });

  protected readonly left = linkedSignal<LeftState | null>(
    () => (this.job()?.machineState ?? null) as LeftState | null,
  );
  protected readonly results = computed(() => {
    const left = this.left();
    return left ? resultsFor(left).map((value) => ({ value, label: wordFor(value) })) : [];
  });
  protected readonly result = linkedSignal<JobResult | null>(() => {
    const recorded = this.job()?.result ?? null;
    const left = this.left();
    if (!left) return recorded;
    const possible = resultsFor(left);
    return recorded && possible.includes(recorded) ? recorded : (possible[0] ?? null);
  });
  protected readonly missing = computed(() => {
    const job = this.job();
    const now = this.values();
    if (!job || !now) return [];
    const shop = job.shop && { ...job.shop, minutes: now.minutes };
    return missingFrom({ ...job, cause: now.cause, shop }, this.left(), this.result());
  });
  protected readonly tried = signal(false);
  protected readonly droppable = computed(() => {
    const job = this.job();
    return !!job && !job.doneAt && job.parts.length === 0 && job.photos.length === 0;
  });

  constructor() {
    void this.#book.takeAlong();
    effect((onCleanup) => {
      const form = this.form();
      if (!form) return;
      this.values.set(form.getRawValue());
      const changes = form.valueChanges.subscribe(() => this.values.set(form.getRawValue()));
      const settled = form.valueChanges
        .pipe(debounceTime(settling))
        .subscribe(() => this.#commit((name) => !written.has(name)));
      onCleanup(() => {
        changes.unsubscribe();
        settled.unsubscribe();
      });
      untracked(() => this.#followMoney());
    });
    effect(() => this.#follow());
    effect(() => this.#lock());
    effect(() => this.#titles.name(this.heading()));
    inject(DestroyRef).onDestroy(() => this.commitAll());
  }

  protected commitAll(): void {
    this.#commit(() => true);
  }

  protected async tick(code: string): Promise<void> {
    await this.visit.record('cautions_ticked', { jobId: this.jobId(), cautions: [code] });
  }

  protected take(name: 'minutes' | 'accessMinutes', minutes: number): void {
    const control = this.form()?.controls[name];
    control?.setValue(minutes);
    control?.markAsDirty();
    this.commitAll();
  }

  /** Our own mistake as the cause and as the mark are one thing to a tech. */
  protected causeChosen(): void {
    const form = this.form();
    if (form?.controls.cause.value !== 'shop_error' || form.controls.mark.value !== 'none') return;
    form.controls.mark.setValue('own_mistake');
    form.controls.mark.markAsDirty();
  }

  protected chooseResult(result: string): void {
    this.result.set(result as JobResult);
  }

  protected async done(): Promise<void> {
    this.commitAll();
    this.tried.set(true);
    const [machineState, result, job] = [this.left(), this.result(), this.job()];
    if (this.missing().length > 0 || !machineState || !result || !job) return;
    await this.visit.record('job_done', { jobId: job.id, result, machineState });
    this.#messages.say(
      `${job.machine.bay} is ${wordFor(result)} and left ${wordFor(machineState)}.`,
    );
    await this.#toVisit();
  }

  protected async drop(): Promise<void> {
    const bay = this.heading();
    const agreed = await this.#confirm.ask({
      heading: `Drop the job on ${bay}?`,
      consequence: `What was entered on ${bay} on this visit is taken back.`,
      action: 'Drop the job',
      destructive: true,
    });
    if (!agreed) return;
    this.form()?.markAsPristine();
    await this.visit.record('job_dropped', { jobId: this.jobId() });
    await this.#toVisit();
  }

  #toVisit(): Promise<boolean> {
    return this.#router.navigate(['/field/visits', this.visit.id]);
  }

  #commit(which: (name: keyof JobValues) => boolean): void {
    const form = this.form();
    const job = this.job();
    if (!form || !job || this.closed()) return;
    const touched = names(form.getRawValue()).filter(
      (name) => which(name) && form.controls[name].dirty && form.controls[name].valid,
    );
    if (touched.length === 0) return;
    const entries = entriesFor(job, form.getRawValue(), new Set(touched));
    for (const name of touched) form.controls[name].markAsPristine();
    for (const { kind, payload } of entries) void this.visit.record(kind, payload);
  }

  /** What is not being entered here shows what was recorded, also on another phone. */
  #follow(): void {
    const form = this.form();
    const values = this.#values();
    if (!form || !values) return;
    for (const name of names(values)) {
      const control = form.controls[name] as { value: unknown; setValue(value: unknown): void };
      const shown = typeof control.value === 'string' ? control.value.trim() : control.value;
      if (form.controls[name].pristine && shown !== values[name]) control.setValue(values[name]);
    }
  }

  #lock(): void {
    const form = this.form();
    if (!form) return;
    const closed = this.closed();
    const locked = this.locked();
    for (const name of names(form.getRawValue())) {
      const off = closed || (locked && (behindCovers as readonly string[]).includes(name));
      const control = form.controls[name];
      if (off && control.enabled) control.disable({ emitEvent: false });
      if (!off && control.disabled) control.enable({ emitEvent: false });
    }
  }

  /** Coins are counted at the price of the cycles, until the tech says otherwise. */
  #followMoney(): void {
    const form = this.form();
    const machineId = this.job()?.machine.id;
    const price = this.visit.sheet()?.machines.find(({ id }) => id === machineId)?.vendPrice ?? 0;
    if (!form) return;
    const { cycles, coins, amount } = form.controls;
    const usual = () => (coins.value > 0 ? cycles.value * price : 0);
    let before = usual();
    form.valueChanges.pipe(takeUntilDestroyed(this.#destroyed)).subscribe(() => {
      const now = usual();
      const own = amount.value !== null && amount.value !== before;
      if (now !== before && !own) {
        amount.setValue(now, { emitEvent: false });
        amount.markAsDirty();
        this.values.set(form.getRawValue());
      }
      before = now;
    });
  }

  readonly #destroyed = inject(DestroyRef);
}
