import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ticketName } from '@lib/domain/words/document-name';
import { DayPipe, EmptyNote, labelFor, SectionHead, TicketCard, wordFor } from '@lib/ui';
import { type Machine } from './machines-api';

/** What was done to a machine, visit by visit, newest first. */
@Component({
  selector: 'tw-machine-history',
  imports: [DayPipe, EmptyNote, RouterLink, SectionHead, TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="History" />
    @for (job of jobs(); track job.jobId) {
      <tw-ticket>
        <div stub>
          <span class="tw-soft">{{ job.ticketNumber ? 'Ticket' : 'Visit' }}</span>
          <strong class="tw-figures">
            {{ job.ticketNumber ? ticketName(job.ticketNumber) : job.visitNumber }}/{{
              job.position
            }}
          </strong>
          <span class="tw-soft">{{ job.on | twDay }}</span>
        </div>
        <p class="found">
          <a class="tw-stretched" [routerLink]="['/shop/visits', job.visitId]">{{
            job.finding || 'No finding noted'
          }}</a>
        </p>
        <p class="tw-soft">
          {{ done(job) }}
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
  protected readonly ticketName = ticketName;

  /** "Pump fitted, full cycle run. Wear. Left as put right." */
  protected done({ action, cause, result }: Machine['jobs'][number]): string {
    const parts = [action, cause && labelFor(cause), result && `Left as ${wordFor(result)}`];
    return parts
      .filter((part) => !!part)
      .map((part) => `${part}.`)
      .join(' ');
  }
}
