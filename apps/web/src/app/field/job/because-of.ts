import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  forwardRef,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { type ControlValueAccessor, NG_VALUE_ACCESSOR } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { DayPipe } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Api } from '../../core/api/api';
import { type SheetJob } from '../kept/kept';
import { FieldVisit } from '../sheets/field-visit';
import { type CauseCandidate, likelyCauses } from './likely-causes';

/** More than these are rarely looked at, and a phone is short. */
const likeliest = 4;

/** Which earlier job brought this one about, the likeliest first; what follows from it follows it. */
@Component({
  selector: 'tw-because-of',
  imports: [DayPipe, MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  providers: [
    { provide: NG_VALUE_ACCESSOR, useExisting: forwardRef(() => BecauseOf), multi: true },
  ],
  template: `
    <fieldset [disabled]="disabled()">
      <legend>Because of</legend>
      <label [class.chosen]="chosen() === null">
        <input
          type="radio"
          name="because-of"
          [checked]="chosen() === null"
          (change)="choose(null)"
        />
        <span>No earlier job of ours</span>
      </label>
      @for (candidate of shown(); track candidate.jobId) {
        <label [class.chosen]="chosen() === candidate.jobId">
          <input
            type="radio"
            name="because-of"
            [checked]="chosen() === candidate.jobId"
            (change)="choose(candidate.jobId)"
          />
          <span>
            <span class="what">
              {{ candidate.bay }}: {{ candidate.action || candidate.finding || 'nothing written' }}
            </span>
            <span class="tw-soft">
              {{ candidate.reference }}, {{ candidate.on | twDay }}. {{ candidate.why.join('. ') }}.
              @if (candidate.warrantedUntil) {
                Warranted until {{ candidate.warrantedUntil | twDay }}.
              }
            </span>
          </span>
        </label>
      } @empty {
        <p class="tw-soft">No job of ours at this store is recent enough to matter.</p>
      }
      @if (shown().length < candidates().length) {
        <button matButton type="button" (click)="all.set(true)">
          All {{ candidates().length }} earlier jobs
        </button>
      }
    </fieldset>
  `,
  styles: `
    fieldset {
      min-inline-size: 0;
      margin: 0;
      padding: 0;
      border: 0;
    }
    legend {
      padding: 0;
      margin-block-end: 0.375rem;
      font-weight: 500;
    }
    label {
      display: grid;
      grid-template-columns: 1.25rem minmax(0, 1fr);
      gap: 0.75rem;
      align-items: start;
      min-block-size: 2.75rem;
      padding: 0.625rem 0.75rem;
      border: 1px solid var(--tw-field-line);
      border-radius: 0.25rem;
      margin-block-end: 0.375rem;
      background: var(--tw-sheet);
      cursor: pointer;
    }
    .chosen {
      border-color: var(--tw-carbon);
      box-shadow: inset 0 0 0 1px var(--tw-carbon);
    }
    input {
      inline-size: 1.25rem;
      block-size: 1.25rem;
      margin: 0.125rem 0 0;
      accent-color: var(--tw-carbon);
    }
    .what {
      display: block;
    }
    p {
      margin: 0;
    }
  `,
})
export class BecauseOf implements ControlValueAccessor {
  readonly #api = inject(Api);
  readonly #visit = inject(FieldVisit);
  readonly job = input.required<SheetJob>();

  protected readonly candidates = signal<readonly CauseCandidate[]>([]);
  protected readonly all = signal(false);
  /** The likeliest, and the one that was chosen. */
  protected readonly shown = computed(() =>
    this.candidates().filter(
      ({ jobId }, at) => this.all() || at < likeliest || jobId === this.chosen(),
    ),
  );
  protected readonly chosen = signal<string | null>(null);
  protected readonly disabled = signal(false);
  #changed: (value: string | null) => void = () => undefined;

  constructor() {
    effect(() => {
      const jobId = this.job().id;
      untracked(() => void this.#load(jobId));
    });
  }

  protected choose(jobId: string | null): void {
    this.chosen.set(jobId);
    this.#changed(jobId);
  }

  writeValue(value: string | null): void {
    this.chosen.set(value);
  }

  registerOnChange(changed: (value: string | null) => void): void {
    this.#changed = changed;
  }

  registerOnTouched(): void {
    // It records as soon as something is chosen.
  }

  setDisabledState(disabled: boolean): void {
    this.disabled.set(disabled);
  }

  /** The server knows more than the phone took along, but it does not know a job not yet sent. */
  async #load(jobId: string): Promise<void> {
    const sheet = this.#visit.sheet();
    if (sheet) this.candidates.set(likelyCauses(sheet, this.job()));
    try {
      const call = this.#api.call('jobs.causeCandidates', { params: { jobId } });
      const { items } = await firstValueFrom(call);
      if (items.length > 0 && jobId === this.job().id) this.candidates.set(items);
    } catch {
      return;
    }
  }
}
