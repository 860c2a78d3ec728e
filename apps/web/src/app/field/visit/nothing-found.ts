import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  output,
  untracked,
} from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { CountStepper, moneyText, Reading } from '@lib/ui';
import { type SheetCall, type SheetMachine } from '../kept/kept';
import { FieldVisit } from '../sheets/field-visit';
import { workMinutes } from './work-minutes';

/** The second of two taps: everything is filled in as it mostly is, and can be put right first. */
@Component({
  selector: 'tw-nothing-found',
  imports: [CountStepper, MatButton, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form [formGroup]="form()" (ngSubmit)="record()">
      <p>{{ machine().bay }} ran without a fault when tested.</p>
      <tw-count label="Minutes" formControlName="minutes" [step]="5" [max]="1440" />
      <tw-count label="Full cycles" formControlName="cycles" />
      <tw-count label="Coins put in" formControlName="coins" />
      <p class="tw-soft">{{ moneyWords() }}</p>
      <div class="tw-row">
        <button matButton="filled" type="submit">Nothing found on {{ machine().bay }}</button>
        <button matButton="outlined" type="button" (click)="given.emit()">Not so</button>
      </div>
    </form>
  `,
  styles: `
    form {
      display: grid;
      gap: 0.5rem;
      padding: 0.75rem;
      border: 1px solid var(--tw-carbon);
      border-radius: var(--tw-corner);
      background: var(--tw-sheet);
    }
    p {
      margin: 0;
    }
  `,
})
export class NothingFound {
  readonly #visit = inject(FieldVisit);
  readonly #reading = inject(Reading);
  readonly machine = input.required<SheetMachine>();
  readonly call = input<SheetCall>();
  readonly recorded = output<void>();
  /** The tech thought better of it. */
  readonly given = output<void>();

  // Made anew for another machine, and only for that: the sheet changes with every act.
  readonly #machineId = computed(() => this.machine().id);
  protected readonly form = linkedSignal({
    source: this.#machineId,
    computation: () => untracked(() => this.#begun()),
  });
  /** One cycle at the price of the machine; what was put in is named, so that the box reconciles. */
  protected readonly moneyWords = computed(() => {
    const price = this.machine().vendPrice;
    if (price === 0) return '';
    const text = moneyText(price, this.#reading.currency(), this.#reading.locale());
    return `A cycle costs ${text}. Coins are counted as that much a cycle.`;
  });

  protected async record(): Promise<void> {
    const { minutes, cycles, coins } = this.form().getRawValue();
    const jobId = await this.#visit.openJob(this.machine().id, this.call());
    const amount = coins > 0 ? cycles * this.machine().vendPrice : 0;
    await this.#visit.record('nothing_found', { jobId, minutes, cycles, coins, amount });
    this.recorded.emit();
  }

  #begun() {
    const sheet = this.#visit.sheet();
    return new FormGroup({
      minutes: new FormControl(sheet ? workMinutes(sheet, new Date()) : 10, { nonNullable: true }),
      cycles: new FormControl(1, { nonNullable: true }),
      coins: new FormControl(0, { nonNullable: true }),
    });
  }
}
