import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ClockPipe, conditionWords, counted, TicketCard, WordPipe } from '@lib/ui';
import { type Sheet } from '../kept/kept';

/** A visit of the day: when, where, how to get in, and what changes the work. */
@Component({
  selector: 'tw-visit-ticket',
  imports: [ClockPipe, RouterLink, TicketCard, WordPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-ticket copy="canary" [planned]="visit().state === 'planned'">
      <div stub>
        @if (visit().window; as window) {
          <span class="time tw-figures">{{ window.from | twClock }}</span>
          <span class="until tw-soft tw-figures">to {{ window.until | twClock }}</span>
        } @else {
          <span class="time">any time</span>
        }
        <span class="tw-soft">{{ visit().state | twWord }}</span>
      </div>
      <h2>
        <a class="tw-stretched" [routerLink]="['/field/visits', visit().id]">
          {{ visit().store.name }}
        </a>
      </h2>
      <p class="tw-soft">{{ visit().store.address }}</p>
      <p>{{ work() }}</p>
      @if (sheet().store.accessWords; as words) {
        <p>{{ words }}</p>
      }
      @for (condition of conditions(); track condition.id) {
        <p class="condition" [class.hazard]="condition.hazard">{{ condition.words }}</p>
      }
      @if (open(); as words) {
        <p>{{ words }}</p>
      }
    </tw-ticket>
  `,
  styles: `
    .time {
      display: block;
      font-size: 1.125rem;
      font-weight: 600;
    }
    [stub] span {
      display: block;
    }
    .time,
    .until {
      white-space: nowrap;
    }
    .until {
      font-size: 0.875rem;
    }
    h2 {
      margin: 0;
      font-size: 1rem;
    }
    p {
      margin: 0.25rem 0 0;
    }
    .condition {
      padding-inline-start: 0.5rem;
      border-inline-start: 3px solid var(--tw-ochre);
    }
    .hazard {
      border-color: var(--tw-alarm);
    }
  `,
})
export class VisitTicket {
  readonly sheet = input.required<Sheet>();

  protected readonly visit = computed(() => this.sheet().visit);
  protected readonly work = computed(() => {
    const { calls, jobs } = this.sheet();
    const bays = new Set([
      ...calls.flatMap(({ machine }) => (machine ? [machine.bay] : [])),
      ...jobs.map(({ machine }) => machine.bay),
    ]);
    const { reason } = this.visit();
    return [bays.size > 0 ? [...bays].sort().join(', ') : '', reason].filter(Boolean).join(': ');
  });
  protected readonly conditions = computed(() => this.sheet().conditions.map(conditionWords));
  protected readonly open = computed(() => {
    const open = this.sheet().openItems.filter(({ doneAt }) => doneAt === null).length;
    return open === 0 ? '' : `${counted(open, 'thing')} left from an earlier visit`;
  });
}
