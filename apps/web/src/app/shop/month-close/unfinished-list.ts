import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { counted, dayText, Reading } from '@lib/ui';
import { type Preview } from './month-close-api';

interface Item {
  readonly key: string;
  readonly words: string;
  readonly link: readonly string[];
}

interface Group {
  readonly words: string;
  /** The verb of each item's link: "Open". */
  readonly verb: string;
  readonly items: readonly Item[];
  readonly count: number;
}

/** What of the month is not finished, each with the way to finish it. */
@Component({
  selector: 'tw-unfinished-list',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2>{{ closed() ? 'Not on these statements' : 'Unfinished' }}</h2>
    @for (group of groups(); track group.words) {
      <details [open]="group.items.length < 4">
        <summary>{{ group.words }}</summary>
        <ul>
          @for (item of group.items; track item.key) {
            <li>
              <span>{{ item.words }}</span>
              <a [routerLink]="item.link">
                {{ group.verb }}<span class="tw-unseen"> {{ item.words }}</span>
              </a>
            </li>
          }
          @if (group.count > group.items.length) {
            <li class="tw-soft">and {{ group.count - group.items.length }} more</li>
          }
        </ul>
      </details>
    } @empty {
      <p class="tw-soft">
        Nothing: every visit is signed off, and somebody gets each store’s statement.
      </p>
    }
  `,
  styles: `
    h2 {
      margin-block: 0 0.5rem;
    }
    summary {
      padding-block: 0.25rem;
      cursor: pointer;
    }
    ul {
      margin: 0 0 0.5rem;
      padding: 0;
      list-style: none;
    }
    li {
      display: flex;
      justify-content: space-between;
      gap: 1rem;
      padding: 0.25rem 0 0.25rem 1rem;
      font-size: 0.9375rem;
    }
    li span:first-child {
      min-inline-size: 0;
      overflow-wrap: anywhere;
    }
  `,
})
export class UnfinishedList {
  readonly #reading = inject(Reading);

  readonly unfinished = input.required<Preview['unfinished']>();
  /** The statements are made: what was not finished stands on later ones. */
  readonly closed = input(false);

  protected readonly groups = computed<readonly Group[]>(() => {
    const { visits, rulings, withoutRecipient } = this.unfinished();
    const all: Group[] = [
      {
        words: `${counted(visits.count, 'visit')} not signed off`,
        verb: 'Open',
        count: visits.count,
        items: visits.items.map(({ visitId, storeName, plannedOn }) => ({
          key: visitId,
          words: `${storeName}, ${dayText(plannedOn, this.#reading.locale())}`,
          link: ['/shop/visits', visitId],
        })),
      },
      {
        words: `${counted(rulings.count, 'visit')} with rulings to decide`,
        verb: 'Decide',
        count: rulings.count,
        items: rulings.items.map(({ visitId, storeName, lines }) => ({
          key: visitId,
          words: `${storeName}, ${counted(lines, 'line')}`,
          link: ['/shop/rulings', visitId],
        })),
      },
      {
        words: `${counted(withoutRecipient.count, 'store')} without anybody who gets the statement`,
        verb: 'Add',
        count: withoutRecipient.count,
        items: withoutRecipient.items.map(({ storeId, storeName }) => ({
          key: storeId,
          words: storeName,
          link: ['/shop/stores', storeId],
        })),
      },
    ];
    return all.filter(({ count }) => count > 0);
  });
}
