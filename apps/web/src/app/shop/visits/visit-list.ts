import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { visitStates } from '@lib/contracts/generated/values';
import { type VisitState } from '@lib/contracts/web';
import { ticketName } from '@lib/domain/words/document-name';
import {
  ChoiceFilter,
  choicesOf,
  DayPipe,
  labelFor,
  ListShell,
  listState,
  PageHead,
  Reading,
} from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { type Column, RowsExport } from '../../core/lists/rows-export';
import { StoreChoices } from '../stores/store-choices';
import { crewChoices } from './crew-choices';
import { stateWords, windowWords, workWords } from './visit-words';
import { type VisitItem, VisitsApi } from './visits-api';

type StateFilter = '' | 'live' | 'unticketed' | VisitState;

/** Visits by day; those whose ticket nobody has signed off can be had alone. */
@Component({
  selector: 'tw-visit-list',
  imports: [ChoiceFilter, DayPipe, ListShell, MatButton, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './visit-list.html',
  styles: `
    .more {
      display: block;
      font-size: 0.875rem;
    }
  `,
})
export class VisitList {
  readonly #api = inject(VisitsApi);
  readonly #exports = inject(RowsExport);
  readonly #reading = inject(Reading);
  protected readonly session = inject(Session);
  protected readonly stores = inject(StoreChoices).current();
  protected readonly crew = crewChoices();

  protected readonly visits = listState((ask) => this.#api.list(ask), {
    sorts: { '-plannedOn': 'Latest day', plannedOn: 'Earliest day' },
    filters: filtersFromAddress({ state: '' as StateFilter, storeId: '', techMembershipId: '' }),
  });
  protected readonly states = [
    { value: 'live', label: 'Still to do' },
    { value: 'unticketed', label: 'Not signed off' },
    ...choicesOf(visitStates),
  ];
  protected readonly mayPlan = computed(() => this.session.mayChange('visits.plan'));
  protected readonly stateWords = stateWords;
  protected readonly workWords = workWords;
  protected readonly ticketName = ticketName;

  constructor() {
    reloadOn(this.visits, 'visit', 'ticket');
    keepInAddress(this.visits);
  }

  protected windowWords(visit: VisitItem): string {
    return windowWords(visit, { locale: this.#reading.locale(), zone: this.#reading.zone() });
  }

  protected byState(state: string): void {
    this.visits.filterBy('state', state as StateFilter);
  }

  protected export(): void {
    const { cursor: _cursor, ...ask } = this.visits.ask();
    void this.#exports.save({
      name: 'visits',
      one: 'visit',
      columns,
      page: (asked) => this.#api.list({ ...ask, ...asked }),
    });
  }
}

const columns: readonly Column<VisitItem>[] = [
  { head: 'Visit', text: ({ number }) => number },
  { head: 'Day', text: ({ plannedOn }) => plannedOn },
  { head: 'Store', text: ({ store }) => store.name },
  { head: 'Client', text: ({ client }) => client.name },
  { head: 'Tech', text: ({ tech }) => tech?.name },
  { head: 'State', text: ({ state }) => labelFor(state) },
  { head: 'For', text: ({ reason }) => reason },
  { head: 'Machines', text: ({ bays }) => bays.join(' ') },
  { head: 'Jobs', text: ({ jobs }) => jobs },
  { head: 'Arrived', text: ({ arrivedAt }) => arrivedAt },
  { head: 'Left', text: ({ leftAt }) => leftAt },
  { head: 'Ticket', text: ({ ticket }) => ticket?.number },
];
