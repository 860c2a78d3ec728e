import { ChangeDetectionStrategy, Component, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { MoneyText } from '@lib/ui/format/money-text';
import { Reading } from '@lib/ui/format/reading';
import { DayPipe } from '@lib/ui/format/time-pipes';
import { dayText } from '@lib/ui/format/times';
import { PageHead } from '@lib/ui/head/page-head';
import { SectionHead } from '@lib/ui/head/section-head';
import { ListShell } from '@lib/ui/list/list-shell';
import { listState } from '@lib/ui/list/list-state';
import { LoadNote } from '@lib/ui/notes/load-note';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { LabelPipe } from '@lib/ui/words/words';
import { reloadOn } from '../../core/live/reload-on';
import { Titles } from '../../core/navigation/titles';
import { type Contract, ContractsApi } from './contracts-api';
import { coverageWords } from './coverage-words';

/** A maintenance contract: what it costs, what it pays for, when the shop comes. */
@Component({
  selector: 'tw-contract-page',
  imports: [
    DayPipe,
    LabelPipe,
    ListShell,
    LoadNote,
    MoneyText,
    PageHead,
    RouterLink,
    SectionHead,
    TicketCard,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './contract-page.html',
  styles: `
    .amount {
      display: block;
      font-size: 1.25rem;
      font-weight: 600;
      text-align: start;
    }
    p {
      margin: 0 0 0.5rem;
    }
    .words {
      font-size: 1.125rem;
      font-weight: 500;
    }
  `,
})
export class ContractPage {
  readonly #api = inject(ContractsApi);
  readonly #reading = inject(Reading);
  readonly #titles = inject(Titles);
  protected readonly covers = coverageWords;

  readonly contractId = input.required<string>();

  protected readonly contract = rxResource({
    params: () => this.contractId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly rounds = listState((ask) => this.#api.rounds(this.contractId(), ask), {
    sorts: { '-plannedOn': 'Latest', plannedOn: 'Earliest' },
  });

  constructor() {
    reloadOn(this.contract, 'contract');
    reloadOn(this.rounds, 'contract', 'visit');
    effect(() => {
      if (this.contract.hasValue()) this.#titles.name(this.contract.value().name);
    });
  }

  protected sub({ state }: Contract): string {
    return `Maintenance contract · ${state}`;
  }

  protected runs({ startsOn, endsOn }: Contract): string {
    const day = (text: string) => dayText(text, this.#reading.locale());
    return endsOn ? `From ${day(startsOn)} until ${day(endsOn)}.` : `Since ${day(startsOn)}.`;
  }

  /** The rule begins a sentence here. */
  protected rule({ ruleWords }: Contract): string {
    return `${ruleWords.charAt(0).toUpperCase()}${ruleWords.slice(1)}.`;
  }
}
