import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { Router } from '@angular/router';
import { floorOf } from '@lib/ui/floor/floor-of';
import { FloorPlan } from '@lib/ui/floor/floor-plan';
import { Reading } from '@lib/ui/format/reading';
import { LoadNote } from '@lib/ui/notes/load-note';
import { reloadOn } from '../../core/live/reload-on';
import { earningOf } from './earning';
import { FloorsApi, type StoreSummary } from './floors-api';

/** A store as its owner asks after it: how many machines earn, and which of them do not. */
@Component({
  selector: 'tw-store-floor',
  imports: [FloorPlan, LoadNote],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (headed()) {
      @if (level() === 2) {
        <h2>{{ store().name }}</h2>
      } @else {
        <h3>{{ store().name }}</h3>
      }
      <p>
        <strong class="tw-figures">{{ tally().earning }} of {{ tally().all }}</strong> earning
      </p>
    }
    @if (floor.hasValue()) {
      <tw-floor
        [label]="'Floor of ' + store().name"
        [banks]="banks()"
        (opened)="openMachine($event.id)"
      />
    } @else {
      <tw-load-note [of]="floor" />
    }
  `,
  styles: `
    :host {
      display: block;
    }
    h2,
    h3,
    p {
      display: inline-block;
      margin: 0 0.75rem 0.5rem 0;
    }
    p {
      color: var(--tw-soft);
    }
    @media (max-width: 40rem) {
      tw-floor {
        --tw-glyph: 2rem;
      }
    }
    strong {
      color: var(--tw-ink);
      font-weight: 600;
    }
  `,
})
export class StoreFloor {
  readonly #api = inject(FloorsApi);
  readonly #reading = inject(Reading);
  readonly #router = inject(Router);

  readonly store = input.required<StoreSummary>();
  /** Of its heading, below that of the page or of a section. */
  readonly level = input<2 | 3>(3);
  /** False where the page says the name of the store already. */
  readonly headed = input(true);

  protected readonly floor = rxResource({
    params: () => this.store().id,
    stream: ({ params }) => this.#api.floor(params),
  });
  protected readonly banks = computed(() =>
    this.floor.hasValue()
      ? floorOf(this.floor.value(), {
          locale: this.#reading.locale(),
          zone: this.#reading.zone(),
        })
      : [],
  );
  protected readonly tally = computed(() => earningOf([this.store()]));

  constructor() {
    reloadOn(this.floor, 'stores', 'machines', 'call');
  }

  protected openMachine(machineId: string): void {
    void this.#router.navigate(['/client/machines', machineId]);
  }
}
