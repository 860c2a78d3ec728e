import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { DayPipe, EmptyNote, LabelPipe, SectionHead, TicketCard, WordPipe } from '@lib/ui';
import { type Machine } from './machines-api';

/** What was done to a machine, visit by visit, newest first. */
@Component({
  selector: 'tw-machine-history',
  imports: [DayPipe, EmptyNote, LabelPipe, RouterLink, SectionHead, TicketCard, WordPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="History" />
    @for (job of jobs(); track job.jobId) {
      <tw-ticket>
        <div stub>
          <span class="tw-soft">{{ job.ticketNumber ? 'Ticket' : 'Visit' }}</span>
          <strong class="tw-figures">
            {{ job.ticketNumber ?? job.visitNumber }}/{{ job.position }}
          </strong>
          <span class="tw-soft">{{ job.on | twDay }}</span>
        </div>
        <p class="found">
          <a class="tw-stretched" [routerLink]="['/shop/visits', job.visitId]">{{
            job.finding || 'No finding noted'
          }}</a>
        </p>
        <p class="tw-soft">
          {{ job.action }}
          @if (job.cause) {
            <span>{{ job.cause | twLabel }}.</span>
          }
          @if (job.result) {
            <span>Left as {{ job.result | twWord }}.</span>
          }
        </p>
      </tw-ticket>
    } @empty {
      <tw-empty
        text="What is found and done on visits appears here, with its ticket once that is signed off."
      />
    }
  `,
  styles: `
    tw-ticket {
      margin-block-end: 0.75rem;
    }
    [stub] > * {
      display: block;
    }
    p {
      margin: 0;
    }
    .found {
      font-weight: 500;
    }
  `,
})
export class MachineHistory {
  readonly jobs = input.required<Machine['jobs']>();
}
