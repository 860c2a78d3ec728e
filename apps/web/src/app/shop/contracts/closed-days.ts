import { ChangeDetectionStrategy, Component, effect, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { ChoiceChips, FormNotes, LoadNote, PageHead, TextField } from '@lib/ui';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { type Closures, ContractsApi } from './contracts-api';
import { weekdays } from './rule-choices';

/** Weekdays by their number, as the form's choices: 1 is Monday. */
const choices = weekdays.map(({ label }, at) => ({ value: String(at + 1), label }));

/** The days the shop is closed: rounds that fall on them go to an open one. */
@Component({
  selector: 'tw-closed-days',
  imports: [ChoiceChips, FormNotes, LoadNote, MatButton, PageHead, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head
      heading="Closed days"
      sub="Rounds that fall on them go to an open day; what is planned already stays."
      upLink="/shop/contracts"
      upLabel="Contracts"
    />
    @if (closures.hasValue()) {
      <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
        <tw-form-notes [notes]="saving.notes()" />
        <tw-choices
          legend="Every week closed on"
          many
          [choices]="choices"
          formControlName="weekdays"
        />
        <h2>Single days</h2>
        @for (day of days.controls; track day) {
          <div class="beside day">
            <tw-text-field label="Day" type="date" [control]="day.controls.day" />
            <tw-text-field label="Why" [control]="day.controls.words" />
            <div>
              <button matButton type="button" (click)="remove($index)">
                Remove<span class="tw-unseen"> {{ day.controls.words.value }}</span>
              </button>
            </div>
          </div>
        }
        @if (session.mayChange('settings.change')) {
          <div>
            <button matButton="outlined" type="button" (click)="add()">Add a day</button>
          </div>
          <div class="actions">
            <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
              Save the closed days
            </button>
          </div>
        }
      </form>
    } @else {
      <tw-load-note [of]="closures" />
    }
  `,
  styles: `
    .day {
      align-items: center;
    }
    h2 {
      margin: 0.5rem 0 0;
    }
  `,
})
export class ClosedDays implements HasChanges {
  readonly #api = inject(ContractsApi);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #messages = inject(Messages);
  protected readonly session = inject(Session);

  protected readonly choices = choices;
  protected readonly closures = rxResource({ stream: () => this.#api.closures() });
  protected readonly form = this.#build.group({
    weekdays: [[] as readonly string[]],
    days: this.#build.array([this.#day('', '')]),
  });
  protected readonly days = this.form.controls.days;

  protected readonly saving: Submission<Closures> = submission(this.form, () => this.#send(), {
    done: (closures) => {
      this.closures.set(closures);
      this.#messages.say('Rounds to come keep off these days.');
    },
    refused: (problem) => toldStale(problem, this.closures, this.saving.notes),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    this.days.clear();
    effect(() => {
      if (!this.closures.hasValue() || this.form.dirty) return;
      const { weekdays: closed, days } = this.closures.value();
      this.days.clear();
      for (const { day, words } of days) this.days.push(this.#day(day, words));
      this.form.reset({ weekdays: closed.map(String), days });
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected add(): void {
    this.days.push(this.#day('', ''));
    this.days.markAsDirty();
  }

  protected remove(index: number): void {
    this.days.removeAt(index);
    this.days.markAsDirty();
  }

  #day(day: string, words: string) {
    return this.#build.group({
      day: [day, Validators.required],
      words: [words, [Validators.required, Validators.maxLength(80)]],
    });
  }

  #send() {
    const { weekdays: closed, days } = this.form.getRawValue();
    const version = this.closures.hasValue() ? this.closures.value().version : 0;
    return this.#api.changeClosures(version, { weekdays: closed.map(Number), days });
  }
}
