import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { type CallState } from '@lib/contracts/web';
import {
  ChoiceFilter,
  DayPipe,
  InstantPipe,
  labelFor,
  LabelPipe,
  ListShell,
  listState,
  PageHead,
} from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { type Column, RowsExport } from '../../core/lists/rows-export';
import { StoreChoices } from '../stores/store-choices';
import { type CallItem, CallsApi } from './calls-api';

type StateFilter = '' | 'live' | CallState;

/** Reported faults, newest first. */
@Component({
  selector: 'tw-call-list',
  imports: [
    ChoiceFilter,
    DayPipe,
    InstantPipe,
    LabelPipe,
    ListShell,
    MatButton,
    PageHead,
    RouterLink,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './call-list.html',
  styles: `
    .more {
      display: block;
      font-size: 0.875rem;
    }
  `,
})
export class CallList {
  readonly #api = inject(CallsApi);
  readonly #exports = inject(RowsExport);
  protected readonly session = inject(Session);
  protected readonly stores = inject(StoreChoices).current();

  protected readonly calls = listState((ask) => this.#api.list(ask), {
    sorts: { '-reportedAt': 'Newest' },
    filters: filtersFromAddress({ state: '' as StateFilter, storeId: '' }),
  });
  protected readonly states = (['live', 'open', 'planned', 'closed', 'withdrawn'] as const).map(
    (value) => ({ value, label: value === 'live' ? 'Open or planned' : labelFor(value) }),
  );
  protected readonly mayReport = computed(() => this.session.mayChange('calls.report'));

  constructor() {
    reloadOn(this.calls, 'call', 'visit');
    keepInAddress(this.calls);
  }

  protected byState(state: string): void {
    this.calls.filterBy('state', state as StateFilter);
  }

  protected export(): void {
    const { cursor: _cursor, ...ask } = this.calls.ask();
    void this.#exports.save({
      name: 'calls',
      one: 'call',
      columns,
      page: (asked) => this.#api.list({ ...ask, ...asked }),
    });
  }
}

const columns: readonly Column<CallItem>[] = [
  { head: 'Call', text: ({ number }) => number },
  { head: 'Store', text: ({ store }) => store.name },
  { head: 'Client', text: ({ client }) => client.name },
  { head: 'Machine', text: ({ machine }) => machine?.bay },
  { head: 'Symptom', text: ({ symptom }) => labelFor(symptom) },
  { head: 'Words', text: ({ words }) => words },
  { head: 'State', text: ({ state }) => labelFor(state) },
  { head: 'Reported by', text: ({ reportedBy }) => reportedBy },
  { head: 'Reported at', text: ({ reportedAt }) => reportedAt },
  { head: 'Visit', text: ({ visit }) => visit?.number },
];
