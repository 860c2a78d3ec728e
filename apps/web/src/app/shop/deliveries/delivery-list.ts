import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { deliveryStates } from '@lib/contracts/generated/values';
import { type DeliveryState } from '@lib/contracts/web';
import {
  Callout,
  ChoiceFilter,
  choicesOf,
  counted,
  InstantPipe,
  ListShell,
  listState,
  PageHead,
} from '@lib/ui';
import { RowsExport } from '../../core/lists/rows-export';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { DeliveriesApi, type Delivery } from './deliveries-api';
import { DeliveryDecision } from './delivery-decision';
import { deliveryWords, waitsForDecision } from './delivery-words';

/** Every mail to the shop's clients; the ones that went wrong are decided here. */
@Component({
  selector: 'tw-delivery-list',
  imports: [
    Callout,
    ChoiceFilter,
    DeliveryDecision,
    InstantPipe,
    ListShell,
    MatButton,
    PageHead,
    RouterLink,
  ],
  templateUrl: './delivery-list.html',
  styles: `
    .address,
    .error,
    .sent {
      display: block;
      font-weight: 400;
      font-size: 0.875rem;
      overflow-wrap: anywhere;
    }
    .made,
    .sent {
      white-space: nowrap;
    }
    tw-callout {
      margin-block-end: 1rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DeliveryList {
  readonly #api = inject(DeliveriesApi);
  readonly #exports = inject(RowsExport);
  protected readonly counted = counted;
  protected readonly waitsForDecision = waitsForDecision;
  protected readonly states = choicesOf(deliveryStates);

  protected readonly deliveries = listState((ask) => this.#api.list(ask), {
    sorts: { '-createdAt': 'Newest first' },
    filters: filtersFromAddress({
      state: '' as '' | DeliveryState,
      runId: '' as string,
      statementId: '' as string,
    }),
  });
  readonly #uncertain = rxResource({
    stream: () => this.#api.list({ state: 'uncertain', limit: 1 }),
  });
  protected readonly waiting = computed(() =>
    this.#uncertain.hasValue() ? this.#uncertain.value().count.value : 0,
  );

  constructor() {
    keepInAddress(this.deliveries);
    reloadOn(this.deliveries, 'delivery', 'statement-run');
    reloadOn(this.#uncertain, 'delivery', 'statement-run');
  }

  protected stands({ state, sentAt, attempt }: Delivery): string {
    if (sentAt) return 'sent';
    const tries = attempt > 1 ? `, tried ${attempt} times` : '';
    return deliveryWords(state) + tries;
  }

  protected decided(): void {
    this.deliveries.reload();
    this.#uncertain.reload();
  }

  protected save(): void {
    const ask = this.deliveries.ask();
    void this.#exports.save<Delivery>({
      name: 'mails',
      one: 'mail',
      columns: [
        { head: 'To', text: (row) => row.recipient },
        { head: 'Name', text: (row) => row.recipientName },
        { head: 'About', text: (row) => row.subject },
        { head: 'Made', text: (row) => row.createdAt },
        { head: 'State', text: (row) => row.state },
        { head: 'Sent', text: (row) => row.sentAt },
        { head: 'Problem', text: (row) => row.lastError },
      ],
      page: (asked) => this.#api.list({ ...ask, ...asked }),
    });
  }
}
