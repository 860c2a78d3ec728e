import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { DayPipe, InstantPipe } from '@lib/ui/format/time-pipes';
import { PageHead } from '@lib/ui/head/page-head';
import { ChoiceFilter } from '@lib/ui/list/choice-filter';
import { ListShell } from '@lib/ui/list/list-shell';
import { listState } from '@lib/ui/list/list-state';
import { WordPipe } from '@lib/ui/words/words';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { RowsExport } from '../../core/lists/rows-export';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { faultText } from './call-words';
import { CallsApi } from './calls-api';

type State = '' | 'live' | 'closed' | 'withdrawn';

/** Every fault that was reported, and how far it has come. */
@Component({
  selector: 'tw-call-list',
  imports: [
    ChoiceFilter,
    DayPipe,
    InstantPipe,
    ListShell,
    MatButton,
    PageHead,
    RouterLink,
    WordPipe,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Calls" sub="Faults that were reported, and how far each has come">
      @if (session.mayChange('calls.report')) {
        <a matButton="filled" routerLink="new">Report a fault</a>
      }
    </tw-page-head>
    <tw-list-shell
      [list]="calls"
      searchLabel="Search calls"
      [csv]="true"
      (csvAsked)="save()"
      empty="Faults that you or the shop write down stand here, with how far each has come."
    >
      <tw-choice-filter
        filters
        label="Show"
        any="All"
        [options]="states"
        [value]="calls.filters().state"
        (chosen)="narrow($event)"
      />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Fault</th>
            <th scope="col">Store</th>
            <th scope="col">Reported</th>
            <th scope="col">How far</th>
          </tr>
        </thead>
        <tbody>
          @for (call of calls.items(); track call.id) {
            <tr>
              <th scope="row">
                <a [routerLink]="call.id">{{ fault(call) }}</a>
              </th>
              <td data-label="Store">{{ call.store.name }}</td>
              <td data-label="Reported">{{ call.reportedAt | twInstant }}</td>
              <td data-label="How far">
                @if (call.state === 'planned' && call.visit; as visit) {
                  a visit on {{ visit.plannedOn | twDay }}
                } @else if (call.state === 'closed') {
                  done
                } @else {
                  {{ call.state | twWord }}
                }
              </td>
            </tr>
          }
        </tbody>
      </table>
      @if (session.mayChange('calls.report')) {
        <a emptyAction matButton="filled" routerLink="new">Report a fault</a>
      }
    </tw-list-shell>
  `,
})
export class CallList {
  readonly #api = inject(CallsApi);
  protected readonly exports = inject(RowsExport);
  protected readonly session = inject(Session);
  protected readonly fault = faultText;

  protected readonly states = [
    { value: 'live', label: 'Not done' },
    { value: 'closed', label: 'Done' },
    { value: 'withdrawn', label: 'Taken back' },
  ];
  protected readonly calls = listState((ask) => this.#api.list(ask), {
    sorts: { '-reportedAt': 'Newest' },
    filters: filtersFromAddress({ state: '' as State }),
  });

  constructor() {
    reloadOn(this.calls, 'call', 'visit');
    keepInAddress(this.calls);
  }

  protected narrow(state: string): void {
    this.calls.filterBy('state', state as State);
  }

  protected save(): void {
    void this.exports.save({
      name: 'calls',
      one: 'call',
      columns: [
        { head: 'Call', text: ({ number }) => number },
        { head: 'Fault', text: faultText },
        { head: 'In words', text: ({ words }) => words },
        { head: 'Store', text: ({ store }) => store.name },
        { head: 'Reported', text: ({ reportedAt }) => reportedAt },
        { head: 'Reported by', text: ({ reportedBy }) => reportedBy },
        { head: 'State', text: ({ state }) => state },
        { head: 'Visit on', text: ({ visit }) => visit?.plannedOn },
        { head: 'Done', text: ({ closedAt }) => closedAt },
      ],
      page: (asked) => this.#api.list({ ...this.calls.ask(), ...asked }),
    });
  }
}
