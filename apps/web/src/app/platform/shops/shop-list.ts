import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { subscriptionStates } from '@lib/contracts/generated/values';
import { type SubscriptionState } from '@lib/contracts/web';
import {
  ChoiceFilter,
  choicesOf,
  InstantPipe,
  labelFor,
  ListShell,
  listState,
  PageHead,
} from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { RowsExport } from '../../core/lists/rows-export';
import { PlatformApi } from '../platform-api';
import { needsLook, stateWords } from './shop-words';

/** Every shop with its plan and how its subscription stands; nothing of its business. */
@Component({
  selector: 'tw-platform-shop-list',
  imports: [ChoiceFilter, InstantPipe, ListShell, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Shops" />
    <tw-list-shell
      [list]="shops"
      searchLabel="Search shops"
      empty="A shop stands here as soon as somebody opens one."
      [csv]="true"
      (csvAsked)="save()"
    >
      <tw-choice-filter
        filters
        label="Subscription"
        any="Any"
        [options]="states"
        [value]="shops.filters().state"
        (chosen)="narrowState($event)"
      />
      <tw-choice-filter
        filters
        label="Plan"
        any="Any"
        [options]="plans()"
        [value]="shops.filters().planId"
        (chosen)="shops.filterBy('planId', $event)"
      />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Shop</th>
            <th scope="col">Plan</th>
            <th scope="col">Subscription</th>
            <th scope="col">Since</th>
            <th scope="col" class="num">Stores</th>
            <th scope="col" class="num">Machines</th>
            <th scope="col" class="num">Crew</th>
          </tr>
        </thead>
        <tbody>
          @for (shop of shops.items(); track shop.id) {
            <tr>
              <th scope="row">
                <a [routerLink]="shop.id">{{ shop.name }}</a>
              </th>
              <td data-label="Plan">{{ shop.planName }}</td>
              <td data-label="Subscription" [class.alarm]="needsLook(shop.state)">
                {{ stateWords(shop.state) }}
              </td>
              <td data-label="Since">{{ shop.stateSince | twInstant }}</td>
              <td class="num" data-label="Stores">{{ shop.stores }}</td>
              <td class="num" data-label="Machines">{{ shop.machines }}</td>
              <td class="num" data-label="Crew">{{ shop.crew }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
})
export class ShopList {
  readonly #api = inject(PlatformApi);
  readonly #exports = inject(RowsExport);
  protected readonly stateWords = stateWords;
  protected readonly needsLook = needsLook;

  protected readonly states = choicesOf(subscriptionStates, (value) => labelFor(stateWords(value)));
  readonly #plans = rxResource({ stream: () => this.#api.plans() });
  protected readonly plans = computed(() =>
    this.#plans.hasValue()
      ? this.#plans.value().items.map(({ id, name }) => ({ value: id, label: name }))
      : [],
  );
  protected readonly shops = listState((ask) => this.#api.shops(ask), {
    sorts: { name: 'Name', '-createdAt': 'Newest' },
    filters: filtersFromAddress({
      state: '' as '' | SubscriptionState,
      planId: '' as string,
    }),
  });

  constructor() {
    keepInAddress(this.shops);
  }

  protected narrowState(state: string): void {
    this.shops.filterBy('state', state as '' | SubscriptionState);
  }

  protected save(): void {
    void this.#exports.save({
      name: 'shops',
      one: 'shop',
      columns: [
        { head: 'Shop', text: ({ name }) => name },
        { head: 'Plan', text: ({ planName }) => planName },
        { head: 'Subscription', text: ({ state }) => state },
        { head: 'Since', text: ({ stateSince }) => stateSince },
        { head: 'Stores', text: ({ stores }) => stores },
        { head: 'Machines', text: ({ machines }) => machines },
        { head: 'Crew', text: ({ crew }) => crew },
        { head: 'Opened', text: ({ createdAt }) => createdAt },
      ],
      page: (asked) => this.#api.shops({ ...this.shops.ask(), ...asked }),
    });
  }
}
