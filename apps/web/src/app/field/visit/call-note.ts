import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { LabelPipe, TicketCard } from '@lib/ui';
import { type SheetCall } from '../kept/kept';

/** A call nobody has begun to work on: what was reported, and the two ways to begin. */
@Component({
  selector: 'tw-call-note',
  imports: [LabelPipe, MatButton, TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-ticket>
      <div stub>{{ bay() }}</div>
      <h3>{{ call().symptom | twLabel }}</h3>
      <p>{{ call().words }}</p>
      <p class="tw-soft">{{ call().reportedBy }}</p>
      <div class="tw-row">
        @if (call().machine) {
          <button matButton="filled" type="button" (click)="begun.emit()">
            Work on {{ bay() }}
          </button>
          <button matButton="outlined" type="button" (click)="foundNothing.emit()">
            Nothing found
          </button>
        } @else {
          <button matButton="outlined" type="button" (click)="begun.emit()">
            Pick the machine on the floor
          </button>
        }
      </div>
    </tw-ticket>
  `,
  styles: `
    h3,
    p {
      margin: 0;
    }
    .tw-row {
      margin-block-start: 0.5rem;
    }
  `,
})
export class CallNote {
  readonly call = input.required<SheetCall>();
  readonly begun = output<void>();
  readonly foundNothing = output<void>();

  protected readonly bay = computed(() => this.call().machine?.bay ?? 'A machine');
}
