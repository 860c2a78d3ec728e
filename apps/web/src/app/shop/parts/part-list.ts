import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import { currencySign, ListShell, listState, MoneyText, PageHead, Reading } from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { ListExport } from '../exports/list-export';
import { PriceBookApi } from '../price-book/price-book-api';
import { soldFor } from '../price-book/sold-for';
import { ShowFilter, type Shown } from '../show-filter/show-filter';
import { partNotes } from './part-words';
import { type Part, PartsApi } from './parts-api';

@Component({
  selector: 'tw-part-list',
  imports: [
    ListShell,
    MatButton,
    MatFormField,
    MatInput,
    MatLabel,
    MoneyText,
    PageHead,
    RouterLink,
    ShowFilter,
  ],
  templateUrl: './part-list.html',
  styles: `
    .category {
      inline-size: 11rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PartList {
  readonly #api = inject(PartsApi);
  readonly #book = inject(PriceBookApi);
  readonly #reading = inject(Reading);
  protected readonly session = inject(Session);
  protected readonly exports = inject(ListExport);
  protected readonly partNotes = partNotes;

  protected readonly parts = listState((ask) => this.#api.list(ask), {
    sorts: { number: 'Number', name: 'Name' },
    filters: filtersFromAddress({ show: '' as Shown, category: '' as string }),
  });
  readonly #inUse = rxResource({ stream: () => this.#api.categories() });
  readonly #inForce = rxResource({ stream: () => this.#book.inForce() });
  protected readonly categories = computed(() =>
    this.#inUse.hasValue() ? this.#inUse.value().items : [],
  );
  protected readonly sign = computed(() =>
    currencySign(this.#reading.currency(), this.#reading.locale()),
  );

  constructor() {
    keepInAddress(this.parts);
    reloadOn(this.parts, 'parts');
    reloadOn(this.#inUse, 'parts');
  }

  /** By the price book of today; clients may have agreed on something else. */
  protected priceOf(part: Part): number | undefined {
    if (part.fixedPrice !== null) return part.fixedPrice;
    if (!this.#inForce.hasValue()) return undefined;
    const { book } = this.#inForce.value();
    const own = book.partPrices.find(({ partId }) => partId === part.id);
    return own?.unitPrice ?? soldFor(part.unitCost, book);
  }

  protected chooseCategory(event: Event): void {
    this.parts.filterBy('category', (event.target as HTMLSelectElement).value);
  }
}
