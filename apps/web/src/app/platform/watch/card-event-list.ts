import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ChoiceFilter, InstantPipe, ListShell, listState, PageHead } from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { RowsExport } from '../../core/lists/rows-export';
import { type CardEvent, PlatformApi } from '../platform-api';

type State = '' | 'waiting' | 'worked';

/** What the card payment service told, and whether it was worked; not what it was about. */
@Component({
  selector: 'tw-card-event-list',
  imports: [ChoiceFilter, InstantPipe, ListShell, PageHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Card events" sub="What the card payment service told us, by kind" />
    <tw-list-shell
      [list]="events"
      searchLabel="Search by kind or id"
      empty="Events stand here once the card payment service sends the first."
      [csv]="true"
      (csvAsked)="save()"
    >
      <tw-choice-filter
        filters
        label="Show"
        any="All"
        [options]="states"
        [value]="events.filters().state"
        (chosen)="narrow($event)"
      />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Kind</th>
            <th scope="col">Account</th>
            <th scope="col">Received</th>
            <th scope="col">Worked</th>
            <th scope="col" class="num">Attempts</th>
          </tr>
        </thead>
        <tbody>
          @for (event of events.items(); track event.id) {
            <tr>
              <th scope="row">
                {{ event.type }}
                <span class="small tw-soft">{{ event.id }}</span>
              </th>
              <td data-label="Account">{{ event.account ?? 'the platform' }}</td>
              <td data-label="Received">{{ event.receivedAt | twInstant }}</td>
              <td data-label="Worked" [class.alarm]="!event.workedAt && event.lastError">
                <div>
                  {{ event.workedAt ? (event.workedAt | twInstant) : 'waits' }}
                  @if (event.lastError) {
                    <span class="small">{{ event.lastError }}</span>
                  }
                </div>
              </td>
              <td class="num" data-label="Attempts">{{ event.attempts }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
  styles: `
    .small {
      display: block;
      font-size: 0.875rem;
      font-weight: 400;
      overflow-wrap: anywhere;
    }
  `,
})
export class CardEventList {
  readonly #api = inject(PlatformApi);
  readonly #exports = inject(RowsExport);

  protected readonly states = [
    { value: 'waiting', label: 'Waiting' },
    { value: 'worked', label: 'Worked' },
  ];
  protected readonly events = listState((ask) => this.#api.cardEvents(ask), {
    sorts: { '-receivedAt': 'Newest' },
    filters: filtersFromAddress({ state: '' as State }),
  });

  constructor() {
    keepInAddress(this.events);
  }

  protected narrow(state: string): void {
    this.events.filterBy('state', state as State);
  }

  protected save(): void {
    void this.#exports.save<CardEvent>({
      name: 'card-events',
      one: 'event',
      columns: [
        { head: 'Event', text: ({ id }) => id },
        { head: 'Kind', text: ({ type }) => type },
        { head: 'Account', text: ({ account }) => account },
        { head: 'Received', text: ({ receivedAt }) => receivedAt },
        { head: 'Worked', text: ({ workedAt }) => workedAt },
        { head: 'Attempts', text: ({ attempts }) => attempts },
        { head: 'Problem', text: ({ lastError }) => lastError },
      ],
      page: (asked) => this.#api.cardEvents({ ...this.events.ask(), ...asked }),
    });
  }
}
