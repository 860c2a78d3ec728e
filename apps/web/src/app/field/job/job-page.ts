import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  linkedSignal,
  signal,
} from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { type JobResult } from '@lib/contracts/web';
import {
  AmountField,
  Callout,
  ChoiceChips,
  choicesOf,
  conditionWords,
  CountStepper,
  labelFor,
  PageHead,
  TextField,
  wordFor,
  WordsField,
} from '@lib/ui';
import { Confirm } from '../../core/confirm/confirm';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { OutboxLine } from '../outbox/outbox-line';
import { PartBook } from '../parts/part-book';
import { FieldVisit } from '../sheets/field-visit';
import { workMinutes } from '../visit/work-minutes';
import { BecauseOf } from './because-of';
import { JobCautions } from './job-cautions';
import { JobEntry } from './job-entry';
import { causeChoices, codeChoices, commonCodes, markChoices } from './job-form';
import { JobParts } from './job-parts';
import { JobPhotos } from './job-photos';
import { LeftAs } from './left-as';
import { type LeftState, missingFrom, resultsFor } from './leaving';

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
  providers: [JobEntry],
  host: { '(focusout)': 'entry.commit()', '(document:visibilitychange)': 'entry.commit()' },
})
export class JobPage {
  readonly #router = inject(Router);
  readonly #confirm = inject(Confirm);
  readonly #messages = inject(Messages);
  readonly #book = inject(PartBook);
  readonly #titles = inject(Titles);
  protected readonly visit = inject(FieldVisit);
  readonly jobId = input.required<string>();

  protected readonly entry = inject(JobEntry);
  protected readonly job = this.entry.job;
  protected readonly form = this.entry.form;
  protected readonly closed = this.entry.closed;
  protected readonly locked = this.entry.locked;
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

  protected readonly allCodes = signal(false);
  protected readonly codes = computed(() => {
    const chosen = codeChoices.findIndex(({ value }) => value === this.entry.values()?.code);
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

  // Values of their own: every act makes the job a new object, and must not undo a choice.
  readonly #leftBefore = computed(() => (this.job()?.machineState ?? null) as LeftState | null);
  readonly #resultBefore = computed(() => this.job()?.result ?? null);
  protected readonly left = linkedSignal<LeftState | null>(() => this.#leftBefore());
  protected readonly results = computed(() => {
    const left = this.left();
    return left ? choicesOf(resultsFor(left), wordFor) : [];
  });
  protected readonly result = linkedSignal<JobResult | null>(() => {
    const recorded = this.#resultBefore();
    const left = this.left();
    if (!left) return recorded;
    const possible = resultsFor(left);
    return recorded && possible.includes(recorded) ? recorded : (possible[0] ?? null);
  });
  protected readonly missing = computed(() => {
    const job = this.job();
    const now = this.entry.values();
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
    effect(() => this.entry.open(this.jobId()));
    effect(() => this.#titles.name(this.heading()));
  }

  protected async tick(code: string): Promise<void> {
    await this.visit.record('cautions_ticked', { jobId: this.jobId(), cautions: [code] });
  }

  protected take(name: 'minutes' | 'accessMinutes', minutes: number): void {
    this.entry.enter(name, minutes);
    this.entry.commit();
  }

  /** Our own mistake as the cause and as the mark are one thing to a tech. */
  protected causeChosen(): void {
    const values = this.form()?.getRawValue();
    if (values?.cause === 'shop_error' && values.mark === 'none') {
      this.entry.enter('mark', 'own_mistake');
    }
  }

  protected chooseResult(result: string): void {
    this.result.set(result as JobResult);
  }

  protected async done(): Promise<void> {
    this.entry.commit();
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
    this.entry.forget();
    await this.visit.record('job_dropped', { jobId: this.jobId() });
    await this.#toVisit();
  }

  #toVisit(): Promise<boolean> {
    return this.#router.navigate(['/field/visits', this.visit.id]);
  }
}
