import { inject, Pipe, type PipeTransform } from '@angular/core';
import { Reading } from '@lib/ui/format/reading';
import { dayIn, dayText } from '@lib/ui/format/times';

const names = ['Yesterday', 'Today', 'Tomorrow'];
/** So far away a day could be taken for that of another year. */
const farDays = 200;

/** A day as people say it: today, tomorrow, yesterday, else with its date; the year where it helps. */
export function nearDay(day: string, today: string, locale: string): string {
  const apart = (Date.parse(day) - Date.parse(today)) / 86_400_000;
  const name = names[apart + 1];
  if (name) return name;
  if (Math.abs(apart) > farDays) return dayText(day, locale);
  return new Intl.DateTimeFormat(locale, {
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    timeZone: 'UTC',
  }).format(Date.parse(day));
}

type Place = 'alone' | 'within';

function placed(words: string, place: Place): string {
  return place === 'within' && names.includes(words) ? words.toLowerCase() : words;
}

/** `{{ visit.plannedOn | twNearDay }}`, and `twNearDay: 'within'` within a sentence. */
@Pipe({ name: 'twNearDay' })
export class NearDayPipe implements PipeTransform {
  readonly #reading = inject(Reading);

  transform(day: string, place: Place = 'alone'): string {
    const today = dayIn(this.#reading.zone(), new Date());
    return placed(nearDay(day, today, this.#reading.locale()), place);
  }
}

/** The trade day of an instant, as people say it: `{{ call.reportedAt | twNearInstant }}`. */
@Pipe({ name: 'twNearInstant' })
export class NearInstantPipe implements PipeTransform {
  readonly #reading = inject(Reading);

  transform(instant: string, place: Place = 'alone'): string {
    const zone = this.#reading.zone();
    const day = dayIn(zone, new Date(instant));
    return placed(nearDay(day, dayIn(zone, new Date()), this.#reading.locale()), place);
  }
}
