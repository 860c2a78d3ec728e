import {
  computed,
  DestroyRef,
  effect,
  inject,
  Injectable,
  linkedSignal,
  signal,
  untracked,
} from '@angular/core';
import { debounceTime } from 'rxjs';
import { type SheetJob } from '../kept/kept';
import { FieldVisit } from '../sheets/field-visit';
import { behindCovers, type JobForm, jobForm, written } from './job-form';
import { entriesFor, jobValues, type JobValues } from './job-values';

const names = Object.keys as (values: JobValues) => (keyof JobValues)[];
/** Taps that belong together, as several on a stepper, are one act. */
const settling = 700;

/**
 * What is being entered on a job. There is no saving: what is chosen is recorded a moment later, what
 * is written when its field is left, all of it when the page is.
 */
@Injectable()
export class JobEntry {
  readonly #visit = inject(FieldVisit);
  readonly #jobId = signal('');

  readonly job = computed<SheetJob | undefined>(() =>
    this.#visit.sheet()?.jobs.find(({ id }) => id === this.#jobId()),
  );
  readonly #recorded = computed(() => {
    const job = this.job();
    return job && jobValues(job);
  });
  // A value of its own: every act makes the job a new object, and must not make a new form.
  readonly #formOf = computed(() => (this.job() ? this.#jobId() : undefined));
  readonly form = linkedSignal<string | undefined, JobForm | undefined>({
    source: this.#formOf,
    computation: (id) => (id ? jobForm(untracked(this.#recorded) as JobValues) : undefined),
  });
  /** What the form holds. */
  readonly values = signal<JobValues | undefined>(undefined);
  readonly #price = computed(() => {
    const machineId = this.job()?.machine.id;
    const machines = this.#visit.sheet()?.machines ?? [];
    return machines.find(({ id }) => id === machineId)?.vendPrice ?? 0;
  });

  readonly closed = this.#visit.closed;
  /** Covers are on: not every caution is ticked. */
  readonly locked = computed(() => !this.job()?.shop?.cautionsAt);

  constructor() {
    effect((onCleanup) => {
      const form = this.form();
      if (!form) return;
      untracked(() => this.values.set(form.getRawValue()));
      const changes = form.valueChanges.subscribe(() => this.#changed(form));
      const settled = form.valueChanges
        .pipe(debounceTime(settling))
        .subscribe(() => this.#commit((name) => !written.has(name)));
      onCleanup(() => {
        changes.unsubscribe();
        settled.unsubscribe();
      });
    });
    effect(() => this.#follow());
    effect(() => this.#lock());
    inject(DestroyRef).onDestroy(() => this.commit());
  }

  open(jobId: string): void {
    this.#jobId.set(jobId);
  }

  /** Enters a value as if the person had. */
  enter<K extends keyof JobValues>(name: K, value: JobValues[K]): void {
    const control = this.form()?.controls[name];
    (control as { setValue(value: JobValues[K]): void } | undefined)?.setValue(value);
    control?.markAsDirty();
  }

  /** Records whatever has not been. */
  commit(): void {
    this.#commit(() => true);
  }

  /** Lets go of whatever has not been recorded. */
  forget(): void {
    this.form()?.markAsPristine();
  }

  #commit(which: (name: keyof JobValues) => boolean): void {
    const form = this.form();
    const job = this.job();
    if (!form || !job || this.closed()) return;
    const touched = names(form.getRawValue()).filter(
      (name) => which(name) && form.controls[name].dirty && !form.controls[name].invalid,
    );
    if (touched.length === 0) return;
    const entries = entriesFor(job, form.getRawValue(), new Set(touched));
    for (const name of touched) form.controls[name].markAsPristine();
    for (const { kind, payload } of entries) void this.#visit.record(kind, payload);
  }

  #changed(form: JobForm): void {
    const before = this.values();
    const now = form.getRawValue();
    // Coins are counted at the price of the cycles, until the tech says otherwise.
    if (before && (before.cycles !== now.cycles || before.coins !== now.coins)) {
      const own = before.amount !== null && before.amount !== this.#usualAmount(before);
      const usual = this.#usualAmount(now);
      if (!own && now.amount !== usual) {
        form.controls.amount.setValue(usual, { emitEvent: false });
        form.controls.amount.markAsDirty();
      }
    }
    this.values.set(form.getRawValue());
  }

  #usualAmount({ cycles, coins }: JobValues): number {
    return coins > 0 ? cycles * this.#price() : 0;
  }

  /** What is not being entered here shows what was recorded, also on another phone. */
  #follow(): void {
    const form = this.form();
    const recorded = this.#recorded();
    if (!form || !recorded) return;
    untracked(() => {
      for (const name of names(recorded)) {
        const control = form.controls[name] as { value: unknown; setValue(value: unknown): void };
        const shown = typeof control.value === 'string' ? control.value.trim() : control.value;
        if (form.controls[name].pristine && shown !== recorded[name]) {
          control.setValue(recorded[name]);
        }
      }
    });
  }

  #lock(): void {
    const form = this.form();
    const closed = this.closed();
    const locked = this.locked();
    if (!form) return;
    for (const name of names(form.getRawValue())) {
      const off = closed || (locked && (behindCovers as readonly string[]).includes(name));
      const control = form.controls[name];
      if (off && control.enabled) control.disable({ emitEvent: false });
      if (!off && control.disabled) control.enable({ emitEvent: false });
    }
  }
}
