import { inject, Pipe, type PipeTransform } from '@angular/core';
import { Reading } from './reading';
import { clockText, dayText, instantText, monthText } from './times';

/** A trade day: `{{ visit.day | twDay }}`. */
@Pipe({ name: 'twDay' })
export class DayPipe implements PipeTransform {
  readonly #reading = inject(Reading);
  transform(day: string | null | undefined): string {
    return day ? dayText(day, this.#reading.locale()) : '';
  }
}

/** A month: `{{ statement.month | twMonth }}`. */
@Pipe({ name: 'twMonth' })
export class MonthPipe implements PipeTransform {
  readonly #reading = inject(Reading);
  transform(month: string | null | undefined): string {
    return month ? monthText(month, this.#reading.locale()) : '';
  }
}

/** An instant on the shop's clock: `{{ call.reportedAt | twInstant }}`. */
@Pipe({ name: 'twInstant' })
export class InstantPipe implements PipeTransform {
  readonly #reading = inject(Reading);
  transform(instant: string | null | undefined): string {
    return instant ? instantText(instant, this.#reading.locale(), this.#reading.zone()) : '';
  }
}

/** The time of an instant on the shop's clock: `{{ visit.startsAt | twClock }}`. */
@Pipe({ name: 'twClock' })
export class ClockPipe implements PipeTransform {
  readonly #reading = inject(Reading);
  transform(instant: string | null | undefined): string {
    return instant ? clockText(instant, this.#reading.locale(), this.#reading.zone()) : '';
  }
}
