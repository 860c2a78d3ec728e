import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Reading } from '@lib/ui';
import { type VisitItem } from '../visits/visits-api';
import { DayTicket } from './day-ticket';
import { type DayLine, rowOf, troubleOf } from './lay-out-day';

/** One tech’s day along the line of hours; on a phone a plain list in the same order. */
@Component({
  selector: 'tw-day-row',
  imports: [DayTicket],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2>{{ name() }}</h2>
    <div class="line">
      @if (row().placed.length > 0 || row().anyTime.length === 0) {
        <ul
          class="timed"
          [style.--lanes]="row().lanes"
          [style.--hours]="line().until - line().from"
        >
          @for (place of row().placed; track place.visit.id) {
            <li
              [style.--start]="place.start + '%'"
              [style.--width]="place.width + '%'"
              [style.--lane]="place.lane"
            >
              <tw-day-ticket [visit]="place.visit" [trouble]="troubles()(place.visit)" />
            </li>
          } @empty {
            <li class="free">free</li>
          }
        </ul>
      }
      @if (row().anyTime.length > 0) {
        <ul class="any">
          @for (visit of row().anyTime; track visit.id) {
            <li><tw-day-ticket [visit]="visit" [trouble]="troubles()(visit)" /></li>
          }
        </ul>
      }
    </div>
  `,
  styleUrl: './day-row.scss',
})
export class DayRow {
  readonly #reading = inject(Reading);
  readonly name = input.required<string>();
  readonly visits = input.required<readonly VisitItem[]>();
  readonly line = input.required<DayLine>();

  protected readonly row = computed(() => rowOf(this.visits(), this.line(), this.#reading.zone()));
  protected readonly troubles = computed(() => {
    const visits = this.visits();
    return (visit: VisitItem) => troubleOf(visit, visits, new Date());
  });
}
