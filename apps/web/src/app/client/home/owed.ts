import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { moneyText } from '@lib/ui/format/money';
import { MoneyText } from '@lib/ui/format/money-text';
import { Reading } from '@lib/ui/format/reading';
import { DayPipe, MonthPipe } from '@lib/ui/format/time-pipes';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { PayButton } from '../payments/pay-button';
import { type Balance } from './home-api';

/** What the client owes, a ticket for each store that owes something, the earliest due first. */
@Component({
  selector: 'tw-owed',
  imports: [DayPipe, MoneyText, MonthPipe, PayButton, RouterLink, TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @for (store of owing(); track store.storeId) {
      <tw-ticket copy="rose" wide [alarmed]="store.overdue > 0">
        <div stub>
          <tw-money [amount]="store.balance" [currency]="store.currency" />
          @if (store.overdue > 0) {
            <span class="overdue">overdue since {{ store.dueOn | twDay }}</span>
          } @else if (store.dueOn) {
            <span>due {{ store.dueOn | twDay }}</span>
          }
        </div>
        <div class="body">
          <p>
            {{ store.storeName }}<br />
            @if (store.lastStatementId; as statementId) {
              <a [routerLink]="['/client/statements', statementId]"
                >Statement of {{ store.lastStatementMonth | twMonth }}</a
              >
            }
          </p>
          @if (store.cardPossible) {
            <tw-pay-button [payable]="{ storeId: store.storeId }" [label]="payLabel(store)" />
          } @else {
            <p class="tw-soft">The statement says how to pay.</p>
          }
        </div>
      </tw-ticket>
    } @empty {
      <p>There is nothing to pay.</p>
    }
    @if (unbilled() > 0) {
      <p class="tw-soft">
        Done and not on a statement yet: <tw-money [amount]="unbilled()" />. It comes with the next
        one.
      </p>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 0.75rem;
    }
    [stub] tw-money {
      display: block;
      font-size: 1.125rem;
      font-weight: 600;
      text-align: start;
    }
    [stub] span {
      color: var(--tw-soft);
      font-size: 0.875rem;
    }
    [stub] .overdue {
      color: var(--tw-alarm);
    }
    .body {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      justify-content: space-between;
      gap: 0.5rem 1rem;
    }
    p {
      margin: 0;
    }
  `,
})
export class Owed {
  readonly #reading = inject(Reading);

  readonly balances = input.required<readonly Balance[]>();

  protected readonly owing = computed(() =>
    this.balances()
      .filter(({ balance }) => balance > 0)
      .sort((a, b) => (a.dueOn ?? '').localeCompare(b.dueOn ?? '')),
  );
  protected readonly unbilled = computed(() =>
    this.balances().reduce((sum, { unbilled }) => sum + unbilled, 0),
  );

  protected payLabel({ balance, currency, storeName }: Balance): string {
    return `Pay ${moneyText(balance, currency, this.#reading.locale())} for ${storeName}`;
  }
}
