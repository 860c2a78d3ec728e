import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ClockPipe, problemText } from '@lib/ui';
import { Outbox } from './outbox';
import { Sender } from './sender';

/** At the foot of every page of the area: what has been sent, what waits, what needs the person. */
@Component({
  selector: 'tw-outbox-line',
  imports: [ClockPipe, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <p>
      @if (quietSince(); as since) {
        <span>No answer since {{ since | twClock }}</span>
      } @else if (held(); as words) {
        <span>{{ words }}</span>
      } @else {
        <span>{{ allWell() }}</span>
      }
      <a routerLink="/field/outbox" class="tw-figures" [class.needy]="outbox.refused().length > 0">
        {{ counts() }}
      </a>
    </p>
  `,
  styles: `
    :host {
      display: block;
      margin-block-start: 1.5rem;
    }
    p {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      justify-content: space-between;
      gap: 0 1rem;
      margin: 0;
      color: var(--tw-soft);
      font-size: 0.875rem;
    }
    a {
      display: inline-flex;
      align-items: center;
      min-block-size: 2.75rem;
    }
    .needy {
      color: var(--tw-alarm);
      font-weight: 500;
    }
  `,
})
export class OutboxLine {
  protected readonly outbox = inject(Outbox);
  readonly #sender = inject(Sender);

  protected readonly quietSince = computed(() =>
    this.outbox.waiting().length > 0 ? this.#sender.quietSince() : undefined,
  );
  protected readonly held = computed(() => {
    const problem = this.outbox.waiting().length > 0 ? this.#sender.heldUpBy() : undefined;
    return problem && problemText(problem);
  });
  protected readonly allWell = computed(() => {
    if (this.outbox.waiting().length > 0) return 'Sending';
    return this.outbox.refused().length > 0 ? 'Not everything was taken' : 'Everything is sent';
  });
  protected readonly counts = computed(() => {
    const refused = this.outbox.refused().length;
    const parts = [
      refused === 1 ? '1 needs you' : refused > 1 ? `${refused} need you` : '',
      `${this.outbox.waiting().length} waiting`,
      `${this.outbox.sent().length} sent`,
    ];
    return parts.filter(Boolean).join(', ');
  });
}
