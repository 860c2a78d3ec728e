import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ClockPipe, DayPipe } from '@lib/ui/format/time-pipes';
import { PageHead } from '@lib/ui/head/page-head';
import { ChoiceFilter } from '@lib/ui/list/choice-filter';
import { ListShell } from '@lib/ui/list/list-shell';
import { listState } from '@lib/ui/list/list-state';
import { LabelPipe } from '@lib/ui/words/words';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { RowsExport } from '../../core/lists/rows-export';
import { reloadOn } from '../../core/live/reload-on';
import { VisitsApi } from './visits-api';

type State = '' | 'live' | 'completed' | 'cancelled';

/** Visits to come and visits made. */
@Component({
  selector: 'tw-visit-list',
  imports: [ChoiceFilter, ClockPipe, DayPipe, LabelPipe, ListShell, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Visits" sub="Each with what was found and done, in plain words" />
    <tw-list-shell
      [list]="visits"
      searchLabel="Search visits"
      empty="Visits of the shop to your stores stand here once one is planned."
      [csv]="true"
      (csvAsked)="save()"
    >
      <tw-choice-filter
        filters
        label="Show"
        any="All"
        [options]="states"
        [value]="visits.filters().state"
        (chosen)="narrow($event)"
      />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Day</th>
            <th scope="col">Store</th>
            <th scope="col">Machines</th>
            <th scope="col">State</th>
          </tr>
        </thead>
        <tbody>
          @for (visit of visits.items(); track visit.id) {
            <tr>
              <th scope="row">
                <a [routerLink]="visit.id">{{ visit.plannedOn | twDay }}</a>
                @if (visit.window && !visit.leftAt) {
                  <span class="tw-soft">
                    {{ visit.window.from | twClock }} to {{ visit.window.until | twClock }}
                  </span>
                }
              </th>
              <td data-label="Store">{{ visit.store.name }}</td>
              <td data-label="Machines">{{ visit.bays.join(', ') || visit.reason }}</td>
              <td data-label="State">{{ visit.state | twLabel }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
})
export class VisitList {
  readonly #api = inject(VisitsApi);
  readonly #exports = inject(RowsExport);

  protected readonly states = [
    { value: 'live', label: 'To come' },
    { value: 'completed', label: 'Made' },
    { value: 'cancelled', label: 'Cancelled' },
  ];
  protected readonly visits = listState((ask) => this.#api.list(ask), {
    sorts: { '-plannedOn': 'Latest', plannedOn: 'Earliest' },
    filters: filtersFromAddress({ state: '' as State }),
  });

  constructor() {
    reloadOn(this.visits, 'visit');
    keepInAddress(this.visits);
  }

  protected narrow(state: string): void {
    this.visits.filterBy('state', state as State);
  }

  protected save(): void {
    void this.#exports.save({
      name: 'visits',
      one: 'visit',
      columns: [
        { head: 'Visit', text: ({ number }) => number },
        { head: 'Day', text: ({ plannedOn }) => plannedOn },
        { head: 'Store', text: ({ store }) => store.name },
        { head: 'Machines', text: ({ bays }) => bays.join(', ') },
        { head: 'For', text: ({ reason }) => reason },
        { head: 'State', text: ({ state }) => state },
        { head: 'Ticket', text: ({ ticket }) => ticket?.number },
      ],
      page: (asked) => this.#api.list({ ...this.visits.ask(), ...asked }),
    });
  }
}
