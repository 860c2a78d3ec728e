import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { DayPipe, ListShell, listState, LoadNote, PageHead, SectionHead } from '@lib/ui';
import { of, switchMap } from 'rxjs';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { bookLines } from './book-lines';
import { bookTexts } from './book-texts';
import { BookView } from './book-view';
import { compareBooks } from './compare-books';
import { PartNames } from './part-names';
import { PriceBookApi } from './price-book-api';

/** What is charged today, and the editions before and after it. */
@Component({
  selector: 'tw-edition-list',
  imports: [BookView, DayPipe, ListShell, LoadNote, MatButton, PageHead, RouterLink, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head
      heading="Price book"
      sub="What a visit is priced, taxed and ruled by. An edition is never changed; a new one holds from a day on."
    >
      @if (session.mayChange('prices.change')) {
        <a matButton="filled" routerLink="new">Write a new edition</a>
      }
    </tw-page-head>

    <tw-section-head heading="Editions" />
    <tw-list-shell
      [list]="editions"
      [searchable]="false"
      empty="Each edition of your prices is listed here with the day it holds from."
    >
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Edition</th>
            <th scope="col">Holds from</th>
            <th scope="col">Note</th>
            <th scope="col"><span class="tw-unseen">Stands</span></th>
          </tr>
        </thead>
        <tbody>
          @for (edition of editions.items(); track edition.id) {
            <tr [class.chosen]="edition.inForce">
              <th scope="row">
                <a [routerLink]="edition.id">Edition {{ edition.number }}</a>
              </th>
              <td data-label="Holds from">{{ edition.validFrom | twDay }}</td>
              <td data-label="Note">{{ edition.note }}</td>
              <td>{{ edition.inForce ? 'in force today' : '' }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>

    <tw-section-head heading="In force today" />
    @if (inForce.hasValue()) {
      <tw-book-view [sections]="sections()" />
    } @else {
      <tw-load-note [of]="inForce" />
    }
  `,
})
export class EditionList {
  readonly #api = inject(PriceBookApi);
  readonly #partNames = inject(PartNames);
  protected readonly session = inject(Session);

  protected readonly editions = listState((ask) => this.#api.list(ask), {
    sorts: { '-validFrom': 'Latest first' },
  });
  protected readonly inForce = rxResource({ stream: () => this.#api.inForce() });
  readonly #names = rxResource({
    params: () => (this.inForce.hasValue() ? this.inForce.value().book.partPrices : undefined),
    stream: ({ params }) =>
      of(params).pipe(
        switchMap((prices) => this.#partNames.of(prices.map(({ partId }) => partId))),
      ),
  });
  readonly #texts = bookTexts(() => (this.#names.hasValue() ? this.#names.value() : new Map()));
  protected readonly sections = computed(() =>
    this.inForce.hasValue()
      ? compareBooks(bookLines(this.inForce.value().book, this.#texts()), undefined)
      : [],
  );

  constructor() {
    reloadOn(this.editions, 'prices');
    reloadOn(this.inForce, 'prices');
  }
}
