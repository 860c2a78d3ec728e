import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { counted, dayText, LoadNote, PageHead, Reading } from '@lib/ui';
import { forkJoin, map, type Observable, of, switchMap } from 'rxjs';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { bookLines } from './book-lines';
import { bookTexts } from './book-texts';
import { BookView } from './book-view';
import { compareBooks } from './compare-books';
import { PartNames } from './part-names';
import { type Edition, PriceBookApi } from './price-book-api';

interface Shown {
  readonly edition: Edition;
  readonly before: Edition | undefined;
  readonly names: ReadonlyMap<string, string>;
}

/** One edition of the price book, and what it changed from the one before it. */
@Component({
  selector: 'tw-edition-page',
  imports: [BookView, LoadNote, MatButton, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (shown.hasValue()) {
      @let edition = shown.value().edition;
      <tw-page-head
        [heading]="'Edition ' + edition.number"
        [sub]="sub(edition)"
        upLink="/shop/price-book"
        upLabel="Price book"
      >
        @if (session.mayChange('prices.change')) {
          <a matButton="outlined" routerLink="../new" [queryParams]="{ from: edition.id }"
            >Write a new edition from this one</a
          >
        }
      </tw-page-head>
      @if (edition.note) {
        <p>{{ edition.note }}</p>
      }
      <p class="tw-soft">{{ changesText() }}</p>
      <tw-book-view [sections]="sections()" />
    } @else {
      <tw-page-head heading="Edition" upLink="/shop/price-book" upLabel="Price book" />
      <tw-load-note [of]="shown" />
    }
  `,
})
export class EditionPage {
  readonly #api = inject(PriceBookApi);
  readonly #partNames = inject(PartNames);
  readonly #reading = inject(Reading);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);

  readonly editionId = input.required<string>();

  protected readonly shown = rxResource({
    params: () => this.editionId(),
    stream: ({ params }) => this.#load(params),
  });
  readonly #texts = bookTexts(() => (this.shown.hasValue() ? this.shown.value().names : new Map()));
  protected readonly sections = computed(() => {
    if (!this.shown.hasValue()) return [];
    const { edition, before } = this.shown.value();
    const texts = this.#texts();
    return compareBooks(bookLines(edition.book, texts), before && bookLines(before.book, texts));
  });
  protected readonly changesText = computed(() => {
    const before = this.shown.hasValue() ? this.shown.value().before : undefined;
    if (!before) return 'It is the first edition.';
    const changes = this.sections().reduce((sum, section) => sum + section.changes, 0);
    return changes
      ? `${counted(changes, 'rule')} changed from edition ${before.number}; they are marked.`
      : `Nothing changed from edition ${before.number}.`;
  });

  constructor() {
    effect(() => {
      if (this.shown.hasValue()) this.#titles.name(`Edition ${this.shown.value().edition.number}`);
    });
  }

  protected sub({ validFrom, inForce }: Edition): string {
    const from = `Holds from ${dayText(validFrom, this.#reading.locale())}`;
    return inForce ? `${from} · in force today` : from;
  }

  #load(editionId: string): Observable<Shown> {
    return this.#api.show(editionId).pipe(
      switchMap((edition) => this.#before(edition).pipe(map((before) => ({ edition, before })))),
      switchMap(({ edition, before }) => {
        const prices = [...edition.book.partPrices, ...(before?.book.partPrices ?? [])];
        return forkJoin({
          edition: of(edition),
          before: of(before),
          names: this.#partNames.of(prices.map(({ partId }) => partId)),
        });
      }),
    );
  }

  /** The edition whose place it took: the next lower number. */
  #before(edition: Edition): Observable<Edition | undefined> {
    if (edition.number === 1) return of(undefined);
    return this.#api.list({ limit: 100 }).pipe(
      map(({ items }) => items.filter(({ number }) => number < edition.number)),
      map((earlier) => earlier.sort((a, b) => b.number - a.number)[0]),
      switchMap((found) => (found ? this.#api.show(found.id) : of(undefined))),
    );
  }
}
