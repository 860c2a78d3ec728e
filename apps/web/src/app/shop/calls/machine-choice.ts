import { ChangeDetectionStrategy, Component, computed, inject, input, model } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { FloorPlan, LoadNote, Reading } from '@lib/ui';
import { floorOf } from '@lib/ui/floor/floor-of';
import { StoresApi } from '../stores/stores-api';

/** Which machine it is, touched on the floor of the store; or none, when nobody knows. */
@Component({
  selector: 'tw-machine-choice',
  imports: [FloorPlan, LoadNote, MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (floor.hasValue()) {
      <tw-floor
        label="Which machine it is"
        choice="one"
        [banks]="banks()"
        [chosen]="chosen()"
        (chosenChange)="machineId.set($event[0] ?? null)"
      />
      <p>
        @if (bay(); as label) {
          It is {{ label }}.
          <button matButton type="button" (click)="machineId.set(null)">Not known after all</button>
        } @else {
          No machine is chosen: touch it on the floor, or leave it when the caller does not know.
        }
      </p>
    } @else {
      <tw-load-note [of]="floor" />
    }
  `,
  styles: `
    p {
      min-block-size: 2.75rem;
      margin: 0;
      color: var(--tw-soft);
    }
  `,
})
export class MachineChoice {
  readonly #api = inject(StoresApi);
  readonly #reading = inject(Reading);
  readonly storeId = input.required<string>();
  readonly machineId = model<string | null>(null);

  protected readonly floor = rxResource({
    params: () => this.storeId(),
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
  protected readonly chosen = computed(() => {
    const id = this.machineId();
    return id ? [id] : [];
  });
  protected readonly bay = computed(
    () =>
      this.banks()
        .flatMap(({ bays }) => bays)
        .find(({ id }) => id === this.machineId())?.label,
  );
}
