import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { v7 } from 'uuid';
import { type SheetJob } from '../kept/kept';
import { PartBook } from '../parts/part-book';
import { PartPicker, type PickedPart } from '../parts/part-picker';
import { FieldVisit } from '../sheets/field-visit';

const from: Record<SheetJob['parts'][number]['source'], string> = {
  van: 'from the van',
  shelf: 'from the shelf',
  storeroom: 'of the store’s own',
  ordered: 'ordered',
  salvaged: 'salvaged',
};

/** Parts fitted on the job. */
@Component({
  selector: 'tw-job-parts',
  imports: [MatButton, PartPicker],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @for (part of job().parts; track part.id) {
      <div class="part">
        <span>{{ nameOf(part) }}</span>
        <span class="tw-soft tw-figures">{{ quantity(part) }} {{ from[part.source] }}</span>
        @if (!closed()) {
          <button matButton type="button" (click)="remove(part.id)">
            Take off<span class="tw-unseen"> {{ nameOf(part) }}</span>
          </button>
        }
      </div>
    } @empty {
      @if (!adding()) {
        <p class="tw-soft">None fitted.</p>
      }
    }
    @if (adding()) {
      <tw-part-picker (picked)="add($event)" (closed)="adding.set(false)" />
    } @else if (!closed()) {
      <button
        matButton="outlined"
        type="button"
        disabledInteractive
        [disabled]="locked()"
        (click)="adding.set(!locked())"
      >
        Add a part
      </button>
    }
  `,
  styles: `
    .part {
      display: grid;
      grid-template-columns: minmax(0, 1fr) auto;
      align-items: center;
      gap: 0 0.75rem;
      min-block-size: 2.75rem;
      border-block-end: 1px solid var(--tw-hairline);
      margin-block-end: 0.375rem;
      overflow-wrap: anywhere;
    }
    .part span:first-child {
      grid-column: 1 / -1;
      padding-block-start: 0.25rem;
    }
    p {
      margin-block-end: 0.5rem;
    }
  `,
})
export class JobParts {
  readonly #visit = inject(FieldVisit);
  readonly #book = inject(PartBook);
  readonly job = input.required<SheetJob>();
  readonly closed = input(false);
  /** Covers are still on. */
  readonly locked = input(false);

  protected readonly adding = signal(false);
  protected readonly from = from;

  protected nameOf({ partId, description }: SheetJob['parts'][number]): string {
    return description || this.#book.kept().find(({ id }) => id === partId)?.name || 'A part';
  }

  protected quantity({ quantityMilli }: SheetJob['parts'][number]): string {
    return String(quantityMilli / 1000);
  }

  protected async add(part: PickedPart): Promise<void> {
    this.adding.set(false);
    await this.#visit.record('part_used', { jobId: this.job().id, partUseId: v7(), ...part });
  }

  protected async remove(partUseId: string): Promise<void> {
    await this.#visit.record('part_removed', { jobId: this.job().id, partUseId });
  }
}
