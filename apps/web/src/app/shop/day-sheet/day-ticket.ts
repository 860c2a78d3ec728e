import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Reading } from '@lib/ui';
import { stateWords, windowWords, workWords } from '../visits/visit-words';
import { type VisitItem } from '../visits/visits-api';

/** A visit on the day sheet: a dotted edge is planned, a full one confirmed; what breaks says so. */
@Component({
  selector: 'tw-day-ticket',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="card" [class.planned]="visit().state === 'planned'" [class.alarmed]="trouble()">
      <a class="tw-stretched" [routerLink]="['/shop/visits', visit().id]">{{
        visit().store.name
      }}</a>
      <span class="tw-figures">{{ when() }}</span>
      <span>{{ work() }}</span>
      @if (trouble(); as words) {
        <span class="trouble">{{ words }}</span>
      } @else {
        <span>{{ stateWords(visit()) }}</span>
      }
    </div>
  `,
  styles: `
    .card {
      position: relative;
      block-size: 100%;
      padding: 0.25rem 0.5rem;
      border: 1px solid var(--tw-hairline);
      border-block-start: 3px solid var(--tw-carbon);
      border-radius: 0.25rem;
      background: var(--tw-sheet);
      font-size: 0.875rem;
      line-height: 1.3;
      overflow: hidden;
      overflow-wrap: anywhere;
    }
    .planned {
      border-block-start-style: dotted;
    }
    .alarmed {
      border-color: var(--tw-alarm);
    }
    a {
      display: block;
      font-weight: 500;
      color: var(--tw-ink);
      text-decoration: none;
    }
    a,
    .trouble {
      /* On the line of the day, where the place is the time, words are cut, not the card. */
      white-space: var(--tw-day-words, normal);
      overflow: hidden;
      text-overflow: ellipsis;
    }
    a:hover {
      text-decoration: underline;
    }
    span {
      display: block;
      color: var(--tw-soft);
    }
    .trouble {
      color: var(--tw-alarm);
      font-weight: 500;
    }
  `,
})
export class DayTicket {
  readonly #reading = inject(Reading);
  readonly visit = input.required<VisitItem>();
  readonly trouble = input('');

  protected readonly stateWords = stateWords;
  protected readonly work = computed(() => workWords(this.visit()));
  protected readonly when = computed(() =>
    windowWords(this.visit(), { locale: this.#reading.locale(), zone: this.#reading.zone() }),
  );
}
