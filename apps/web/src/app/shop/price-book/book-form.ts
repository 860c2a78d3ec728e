import { FormArray, FormControl, FormGroup, type ValidatorFn, Validators } from '@angular/forms';
import { type Bearer, type Cause, type LineKind } from '@lib/contracts/web';
import { type PriceBook } from './price-book-api';

type Trip = PriceBook['trips'][number];
type Band = PriceBook['markup']['bands'][number];
type Rate = PriceBook['taxes']['rates'][number];
type PartPrice = PriceBook['partPrices'][number];

function of<T>(value: T, ...validators: ValidatorFn[]): FormControl<T> {
  return new FormControl(value, { nonNullable: true, validators });
}

/** A number that must be given, at most so large. */
function number(value: number | null, max: number, min = 0): FormControl<number | null> {
  return of(value, Validators.required, Validators.min(min), Validators.max(max));
}

const money = (value: number | null) => number(value, 1_000_000_000_000);

export function tripForm(trip?: Trip) {
  return new FormGroup({
    label: of(trip?.label ?? '', Validators.required, Validators.maxLength(60)),
    amount: money(trip?.amount ?? null),
    place: of(trip?.place ?? '', Validators.maxLength(80)),
    zone: of(trip?.zone ?? '', Validators.maxLength(80)),
    upToMetres: of<number | null>(trip?.upToMetres ?? null, Validators.min(1)),
  });
}

export function bandForm(band?: Band) {
  return new FormGroup({
    fromUnitCost: money(band?.fromUnitCost ?? null),
    basisPoints: number(band?.basisPoints ?? null, 100_000),
  });
}

export function rateForm(rate?: Partial<Rate>) {
  return new FormGroup({
    place: of(rate?.place ?? '', Validators.maxLength(80)),
    kind: of<LineKind>(rate?.kind ?? 'part'),
    basisPoints: number(rate?.basisPoints ?? null, 100_000),
    validFrom: of(rate?.validFrom ?? '', Validators.required),
  });
}

export function partPriceForm(price: PartPrice) {
  return new FormGroup({ partId: of(price.partId), unitPrice: money(price.unitPrice) });
}

export function categoryForm(category = '', days: number | null = null) {
  return new FormGroup({
    category: of(category, Validators.required, Validators.maxLength(40)),
    days: number(days, 3650),
  });
}

/** A price book as a form; named as the book is, so that the server's words find their fields. */
export function bookForm(book: PriceBook) {
  const { labour, access, markup, taxes, warranty } = book;
  return new FormGroup({
    labour: new FormGroup({
      normalPerHour: money(labour.normalPerHour),
      afterHoursPerHour: money(labour.afterHoursPerHour),
      minimumMinutes: number(labour.minimumMinutes, 1440),
      incrementMinutes: number(labour.incrementMinutes, 240, 1),
    }),
    access: new FormGroup({
      bill: of<PriceBook['access']['bill']>(access.bill),
      allowanceMinutes: number(access.allowanceMinutes, 1440),
    }),
    trips: new FormArray(book.trips.map(tripForm)),
    tripCost: money(book.tripCost),
    markup: new FormGroup({
      bands: new FormArray(markup.bands.map(bandForm)),
      step: number(markup.step, 1_000_000, 1),
      rounding: of<PriceBook['markup']['rounding']>(markup.rounding),
    }),
    partPrices: new FormArray(book.partPrices.map(partPriceForm)),
    nothingFound: of<PriceBook['nothingFound']>(book.nothingFound),
    taxes: new FormGroup({
      rates: new FormArray(taxes.rates.map(rateForm)),
      rounding: of<PriceBook['taxes']['rounding']>(taxes.rounding),
    }),
    warranty: new FormGroup({
      labourDays: number(warranty.labourDays, 3650),
      partDays: number(warranty.partDays, 3650),
      partDaysByCategory: new FormArray(
        Object.entries(warranty.partDaysByCategory).map(([category, days]) =>
          categoryForm(category, days),
        ),
      ),
      excludedCauses: of<readonly Cause[]>(warranty.excludedCauses),
      callbackDays: number(warranty.callbackDays, 365),
      nothingFoundBearer: of<Bearer>(warranty.nothingFoundBearer),
      confirmAbove: money(warranty.confirmAbove),
    }),
  });
}

export type BookForm = ReturnType<typeof bookForm>;

/** What the form says, as the API takes it. Only for a form that is valid: no number is missing. */
export function bookOf(form: BookForm): PriceBook {
  const value = form.getRawValue();
  const warranty = value.warranty;
  return {
    ...value,
    labour: filled(value.labour),
    access: { ...value.access, allowanceMinutes: value.access.allowanceMinutes ?? 0 },
    trips: value.trips.map(({ label, amount, place, zone, upToMetres }) => ({
      label,
      amount: amount ?? 0,
      ...(place ? { place } : {}),
      ...(zone ? { zone } : {}),
      ...(upToMetres ? { upToMetres } : {}),
    })),
    tripCost: value.tripCost ?? 0,
    markup: {
      ...value.markup,
      bands: value.markup.bands.map(filled),
      step: value.markup.step ?? 1,
    },
    partPrices: value.partPrices.map(({ partId, unitPrice }) => ({
      partId,
      unitPrice: unitPrice ?? 0,
    })),
    taxes: {
      ...value.taxes,
      rates: value.taxes.rates.map((rate) => ({ ...rate, basisPoints: rate.basisPoints ?? 0 })),
    },
    warranty: {
      labourDays: warranty.labourDays ?? 0,
      partDays: warranty.partDays ?? 0,
      partDaysByCategory: Object.fromEntries(
        warranty.partDaysByCategory.map(({ category, days }) => [category.trim(), days ?? 0]),
      ),
      excludedCauses: [...warranty.excludedCauses],
      callbackDays: warranty.callbackDays ?? 0,
      nothingFoundBearer: warranty.nothingFoundBearer,
      confirmAbove: warranty.confirmAbove ?? 0,
    },
  };
}

function filled<V extends Record<string, number | null>>(values: V): { [K in keyof V]: number } {
  return Object.fromEntries(Object.entries(values).map(([name, v]) => [name, v ?? 0])) as {
    [K in keyof V]: number;
  };
}

/** What the form holds until the edition to begin from is there. */
export const emptyBook: PriceBook = {
  labour: { normalPerHour: 0, afterHoursPerHour: 0, minimumMinutes: 0, incrementMinutes: 1 },
  access: { bill: 'never', allowanceMinutes: 0 },
  trips: [],
  tripCost: 0,
  markup: { bands: [], step: 1, rounding: 'nearest' },
  partPrices: [],
  nothingFound: 'free',
  taxes: { rates: [], rounding: 'invoice' },
  warranty: {
    labourDays: 0,
    partDays: 0,
    partDaysByCategory: {},
    excludedCauses: [],
    callbackDays: 0,
    nothingFoundBearer: 'store',
    confirmAbove: 0,
  },
};
