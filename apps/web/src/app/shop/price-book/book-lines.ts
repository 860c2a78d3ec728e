import { counted, labelFor, minutesText, percentText, wordFor } from '@lib/ui';
import { type PriceBook } from './price-book-api';

export interface BookLine {
  readonly section: string;
  /** The same in every edition for the same thing, so that editions can be compared. */
  readonly key: string;
  readonly label: string;
  readonly value: string;
}

/** How amounts and distances are written, and what parts are called. */
export interface BookTexts {
  money(amount: number): string;
  distance(metres: number): string;
  day(day: string): string;
  part(partId: string): string;
}

const accessWords: Record<PriceBook['access']['bill'], string> = {
  never: 'not billed',
  all: 'billed to the minute',
  beyond_allowance: 'billed beyond an allowance',
};

const nothingFoundWords: Record<PriceBook['nothingFound'], string> = {
  bill_minimum: 'share of the trip, and testing up to the least labour',
  bill_trip_share_only: 'share of the trip only',
  free: 'nothing; the other machines share the trip',
};

type Line = Omit<BookLine, 'section'>;

/** A price book as lines that can be read, and compared with those of another edition. */
export function bookLines(book: PriceBook, texts: BookTexts): BookLine[] {
  const sections: Record<string, Line[]> = {
    Labour: labour(book, texts),
    Trips: trips(book, texts),
    Parts: parts(book, texts),
    Taxes: taxes(book, texts),
    Warranty: warranty(book, texts),
  };
  return Object.entries(sections).flatMap(([section, lines]) =>
    lines.map((line) => ({ section, ...line })),
  );
}

function labour({ labour, access, nothingFound }: PriceBook, { money }: BookTexts): Line[] {
  const allowance =
    access.bill === 'beyond_allowance' ? ` of ${minutesText(access.allowanceMinutes)}` : '';
  return [
    line('hour', 'An hour of work', money(labour.normalPerHour)),
    line('after-hours', 'An hour after hours', money(labour.afterHoursPerHour)),
    line('minimum', 'Least labour of a visit', minutesText(labour.minimumMinutes)),
    line('increment', 'Billed in steps of', minutesText(labour.incrementMinutes)),
    line('access', 'Extra minutes to reach a machine', accessWords[access.bill] + allowance),
    line('nothing-found', 'Nothing found', nothingFoundWords[nothingFound]),
  ];
}

function trips({ trips, tripCost }: PriceBook, { money, distance }: BookTexts): Line[] {
  const rules = trips.map((trip) => {
    const holds = [
      trip.place ? `tax place ${trip.place}` : '',
      trip.zone ? `area ${trip.zone}` : '',
      trip.upToMetres ? `up to ${distance(trip.upToMetres)}` : '',
    ].filter(Boolean);
    const where = holds.length ? holds.join(', ') : 'every store';
    return line(`trip ${where}`, `${trip.label} (${where})`, money(trip.amount));
  });
  return [...rules, line('trip-cost', 'What a trip costs us', money(tripCost))];
}

function parts({ markup, partPrices }: PriceBook, texts: BookTexts): Line[] {
  const { money } = texts;
  const bands = [...markup.bands].sort((a, b) => a.fromUnitCost - b.fromUnitCost);
  const rounded = markup.rounding === 'up' ? 'up to the next' : 'to the nearest';
  return [
    ...bands.map((band) =>
      line(
        `band ${band.fromUnitCost}`,
        `On a cost from ${money(band.fromUnitCost)}`,
        `${percentText(band.basisPoints)} %`,
      ),
    ),
    line('step', 'Prices are rounded', `${rounded} ${money(markup.step)}`),
    ...partPrices.map(({ partId, unitPrice }) =>
      line(`part ${partId}`, texts.part(partId), money(unitPrice)),
    ),
  ];
}

function taxes({ taxes }: PriceBook, { day }: BookTexts): Line[] {
  const rates = taxes.rates.map(({ place, kind, basisPoints, validFrom }) =>
    line(
      `tax ${place} ${kind} ${validFrom}`,
      `${labelFor(kind)}, ${place || 'everywhere'}, from ${day(validFrom)}`,
      `${percentText(basisPoints)} %`,
    ),
  );
  const rounding = taxes.rounding === 'line' ? 'line by line' : 'on the ticket’s total';
  const count = rates.length ? counted(rates.length, 'rate') : 'none: nothing is taxed';
  return [line('rates', 'Rates', count), ...rates, line('tax-rounding', 'Rounded', rounding)];
}

function warranty({ warranty }: PriceBook, { money }: BookTexts): Line[] {
  const days = (count: number) => (count ? counted(count, 'day') : 'none');
  const categories = Object.entries(warranty.partDaysByCategory).sort(([a], [b]) =>
    a.localeCompare(b),
  );
  return [
    line('labour-days', 'On labour', days(warranty.labourDays)),
    line('part-days', 'On parts', days(warranty.partDays)),
    ...categories.map(([category, count]) =>
      line(`category ${category}`, `On parts of class ${category}`, days(count)),
    ),
    line(
      'excluded',
      'The store bears even then',
      [...warranty.excludedCauses].sort().map(wordFor).join(', ') || 'nothing',
    ),
    line('callback', 'A return for the same fault is ours within', days(warranty.callbackDays)),
    line('nothing-found-bearer', 'Nothing found is borne by', `the ${warranty.nothingFoundBearer}`),
    line('confirm-above', 'The owner decides above', money(warranty.confirmAbove)),
  ];
}

function line(key: string, label: string, value: string): Line {
  return { key, label, value };
}
