import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import {
  type Choice,
  ChoiceFilter,
  dayText,
  ListShell,
  listState,
  MoneyText,
  PageHead,
  Reading,
} from '@lib/ui';
import { tap } from 'rxjs';
import { RowsExport } from '../../core/lists/rows-export';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { ClientChoices } from '../clients/client-choices';
import { moneySign } from '../money/money-sign';
import { moneyWords } from '../money/money-words';
import { buckets } from './buckets';
import { type Ageing, type AgeingRow, ReceivablesApi } from './receivables-api';

/** Who owes what, by how late it is. */
@Component({
  selector: 'tw-ageing-list',
  imports: [ChoiceFilter, ListShell, MatButton, MoneyText, PageHead, RouterLink],
  templateUrl: './ageing-list.html',
  styles: `
    .client {
      display: block;
      font-weight: 400;
      font-size: 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AgeingList {
  readonly #api = inject(ReceivablesApi);
  readonly #exports = inject(RowsExport);
  readonly #reading = inject(Reading);
  readonly #money = moneyWords();
  protected readonly session = inject(Session);

  protected readonly sign = moneySign();
  protected readonly buckets = buckets;
  protected readonly lateOnly: readonly Choice[] = [{ value: 'true', label: 'Overdue only' }];
  protected readonly clients = inject(ClientChoices).current();
  /** Of the last page that came: its day and the sums of the whole shop. */
  readonly #whole = signal<Pick<Ageing, 'on' | 'totals'> | undefined>(undefined);
  protected readonly totals = computed(() => this.#whole()?.totals);
  protected readonly rows = listState(
    (ask) => this.#api.list(ask).pipe(tap((page) => this.#whole.set(page))),
    {
      sorts: { '-overdue': 'Most overdue', '-total': 'Most owed', store: 'Store' },
      filters: filtersFromAddress({ clientId: '' as string, overdue: '' as '' | 'true' }),
    },
  );
  protected readonly sub = computed(() => {
    const whole = this.#whole();
    if (!whole) return '';
    const { total, current, credit } = whole.totals;
    const overdue = total - current - credit;
    const late = overdue > 0 ? `, ${this.#money(overdue)} of it overdue` : ', nothing overdue';
    return `${this.#money(total)} open${late}, on ${dayText(whole.on, this.#reading.locale())}`;
  });

  constructor() {
    keepInAddress(this.rows);
    reloadOn(this.rows, 'payment', 'statement', 'statement-run');
  }

  protected save(): void {
    const ask = this.rows.ask();
    void this.#exports.save<AgeingRow>({
      name: `receivables-${this.#whole()?.on ?? ''}`,
      one: 'store',
      columns: [
        { head: 'Store', text: (row) => row.storeName },
        { head: 'Client', text: (row) => row.clientName },
        ...buckets.map(({ key, head }) => ({ head, amount: (row: AgeingRow) => row[key] })),
        { head: 'Total', amount: (row) => row.total },
      ],
      page: (asked) => this.#api.list({ ...ask, ...asked }),
    });
  }
}
