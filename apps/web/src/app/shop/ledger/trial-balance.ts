import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { DayPipe, LoadNote, MoneyText } from '@lib/ui';
import { reloadOn } from '../../core/live/reload-on';
import { moneySign } from '../money/money-sign';
import { type AccountCode, LedgerApi } from './ledger-api';
import { accountMeaning, accountName, groupName } from './ledger-words';

/** The balance of every account on a day; debit is above zero, and all of them are zero together. */
@Component({
  selector: 'tw-trial-balance',
  imports: [DayPipe, LoadNote, MatButton, MoneyText],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (balance.hasValue()) {
      @let shown = balance.value();
      <table class="tw-table">
        <caption>
          On
          {{
            shown.on | twDay
          }}
        </caption>
        <thead>
          <tr>
            <th scope="col">Account</th>
            <th scope="col" class="num">Debit, {{ sign() }}</th>
            <th scope="col" class="num">Credit, {{ sign() }}</th>
            <th scope="col" class="num">Balance, {{ sign() }}</th>
            <th scope="col"><span class="tw-unseen">Its entries</span></th>
          </tr>
        </thead>
        @for (group of groups(); track group.name) {
          <tbody>
            <tr>
              <th scope="colgroup" colspan="5" class="group">{{ group.name }}</th>
            </tr>
            @for (row of group.rows; track row.account) {
              <tr>
                <th scope="row">
                  {{ accountName(row.account) }}
                  <span class="tw-soft">{{ accountMeaning(row.account) }}</span>
                </th>
                <td class="num" [attr.data-label]="'Debit, ' + sign()">
                  <tw-money bare [amount]="row.debit" [currency]="shown.currency" />
                </td>
                <td class="num" [attr.data-label]="'Credit, ' + sign()">
                  <tw-money bare [amount]="row.credit" [currency]="shown.currency" />
                </td>
                <td class="num" [attr.data-label]="'Balance, ' + sign()">
                  <tw-money bare [amount]="row.balance" [currency]="shown.currency" />
                </td>
                <td class="tw-acts">
                  <button matButton type="button" (click)="asked.emit(row.account)">
                    Entries<span class="tw-unseen"> of {{ accountName(row.account) }}</span>
                  </button>
                </td>
              </tr>
            }
          </tbody>
        }
        <tfoot>
          <tr>
            <th scope="row">All accounts together</th>
            <td></td>
            <td></td>
            <td class="num" [attr.data-label]="'Balance, ' + sign()">
              <tw-money
                bare
                [amount]="shown.total"
                [currency]="shown.currency"
                [class.alarm]="shown.total !== 0"
              />
            </td>
            <td></td>
          </tr>
        </tfoot>
      </table>
    } @else {
      <tw-load-note [of]="balance" />
    }
  `,
  styles: `
    :host {
      display: block;
      overflow-x: auto;
    }
    .group {
      padding-block-start: 1rem;
      color: var(--tw-soft);
      font-weight: 400;
    }
    th span {
      display: block;
      font-weight: 400;
      font-size: 0.875rem;
    }
  `,
})
export class TrialBalanceTable {
  readonly #api = inject(LedgerApi);

  /** '' is today. */
  readonly on = input('');
  readonly asked = output<AccountCode>();

  protected readonly accountName = accountName;
  protected readonly accountMeaning = accountMeaning;
  protected readonly sign = moneySign();
  protected readonly balance = rxResource({
    params: () => ({ on: this.on() || undefined }),
    stream: ({ params }) => this.#api.trialBalance(params.on),
  });
  protected readonly groups = computed(() => {
    const rows = this.balance.hasValue() ? this.balance.value().accounts : [];
    const kinds = ['assets', 'liabilities', 'revenues', 'expenses'] as const;
    return kinds.map((kind) => ({
      name: groupName(kind),
      rows: rows.filter(({ group }) => group === kind),
    }));
  });

  constructor() {
    reloadOn(this.balance, 'ticket', 'payment', 'statement-run');
  }
}
