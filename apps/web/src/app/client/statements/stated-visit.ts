import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ticketName } from '@lib/domain/words/document-name';
import { foundAndDone } from '@lib/domain/words/found-and-done';
import { MoneyText } from '@lib/ui/format/money-text';
import { BearerLabel } from '@lib/ui/notes/bearer-label';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { labelFor } from '@lib/ui/words/words';
import { moneySign } from '../money-words';
import { NearDayPipe } from '../near-day';
import { type StatedVisit as Visit } from './statements-api';
import { sumsOf } from './statement-sums';

/** One visit of the month: what was found and done, who bears it, and what it came to. */
@Component({
  selector: 'tw-stated-visit',
  imports: [BearerLabel, MoneyText, NearDayPipe, RouterLink, TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './stated-visit.html',
  styleUrl: './stated-visit.scss',
})
export class StatedVisit {
  readonly visit = input.required<Visit>();

  protected readonly sign = moneySign();
  protected readonly ticketName = ticketName;
  protected readonly rows = computed(() => {
    const { jobs, lines } = this.visit();
    const ofJobs = jobs.map((job) => ({
      id: job.jobId,
      head: job.bay,
      words: wordsOf(job),
      ...sumsOf(job.lines),
    }));
    return lines.length > 0
      ? [...ofJobs, { id: 'whole', head: 'The visit', words: 'Trip', ...sumsOf(lines) }]
      : ofJobs;
  });
  protected readonly lines = computed(() => {
    const { jobs, lines } = this.visit();
    return [...jobs.flatMap((job) => job.lines), ...lines];
  });
}

function wordsOf({ found, done, reported, result }: Visit['jobs'][number]): string {
  const otherwise = result === 'nothing_found' ? 'Nothing found' : labelFor(reported);
  return foundAndDone(found || otherwise, done);
}
