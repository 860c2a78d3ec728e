import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { counted, MoneyText, MonthPipe, Reading } from '@lib/ui';
import { moneySign } from '../money/money-sign';
import { againstLast } from './against-last';
import { type Preview, type StoreToClose } from './month-close-api';
import { monthsLater } from './months';

/** A row a store, as its statement says it or would say it, against the month before. */
@Component({
  selector: 'tw-close-table',
  imports: [MoneyText, MonthPipe, RouterLink],
  templateUrl: './close-table.html',
  styles: `
    :host {
      display: block;
      min-inline-size: 0;
      overflow-x: auto;
    }
    th,
    td {
      padding-inline: 0.5rem;
    }
    tbody th {
      min-inline-size: 7rem;
    }
    .foot {
      margin-block: 0.75rem 0;
      font-size: 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CloseTable {
  readonly #reading = inject(Reading);

  readonly preview = input.required<Preview>();

  protected readonly sign = moneySign();
  protected readonly counted = counted;
  /** Only the month's name: the year is plain from the heading. */
  protected readonly lastMonth = computed(() => {
    const names = new Intl.DateTimeFormat(this.#reading.locale(), {
      month: 'long',
      timeZone: 'UTC',
    });
    return names.format(new Date(`${monthsLater(this.preview().month, -1)}-01T00:00:00Z`));
  });

  protected compared(store: StoreToClose) {
    return againstLast(store, this.lastMonth());
  }
}
