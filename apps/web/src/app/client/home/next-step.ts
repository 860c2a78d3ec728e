import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ClockPipe } from '@lib/ui/format/time-pipes';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { NearDayPipe, NearInstantPipe } from '../near-day';
import { type Step } from './next-steps';
import { callWords, machineStanding, visitPurpose, visitStanding } from './step-words';

/** One thing that happens next, or that waits. */
@Component({
  selector: 'tw-next-step',
  imports: [ClockPipe, NearDayPipe, NearInstantPipe, RouterLink, TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './next-step.html',
  styles: `
    :host {
      display: block;
    }
    strong,
    span {
      display: block;
    }
    strong,
    a {
      font-weight: 600;
    }
    span {
      color: var(--tw-soft);
      font-size: 0.875rem;
    }
    .time {
      white-space: nowrap;
    }
    a {
      color: var(--tw-ink);
      text-decoration: none;
    }
    a:hover {
      text-decoration: underline;
    }
    p {
      margin: 0;
      overflow-wrap: anywhere;
    }
  `,
})
export class NextStep {
  readonly step = input.required<Step>();

  protected readonly purpose = visitPurpose;
  protected readonly standing = visitStanding;
  protected readonly callWords = callWords;
  protected readonly machineStanding = machineStanding;
}
