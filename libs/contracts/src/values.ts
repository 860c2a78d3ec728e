import { isTimeZone } from '@lib/domain';
import { z } from 'zod';

/** A trade day in the shop's time zone; days that do not exist are refused. */
export const day = z.iso.date();
export const instant = z.iso.datetime({ offset: true });
/** A calendar month, `2031-04`. */
export const month = z.string().regex(/^\d{4}-(0[1-9]|1[0-2])$/, { error: 'is not a month' });
/** Time of day, `08:30`. */
export const timeOfDay = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, { error: 'is not a time' });

/** Money in minor units of the shop's currency, never negative; below 10^12 so that sums stay exact. */
export const amount = z.int().min(0).max(1_000_000_000_000);
export const signedAmount = z.int().min(-1_000_000_000_000).max(1_000_000_000_000);
/** Hundredths of a percent: 825 is 8.25 %. */
export const basisPoints = z.int().min(0).max(100_000);
/** Thousandths of a piece: 1000 is one. */
export const quantityMilli = z.int().min(1).max(10_000_000);
export const minutes = z.int().min(0).max(1_440);
export const version = z.int().min(1);

export const currency = z
  .string()
  .regex(/^[A-Z]{3}$/, { error: 'is not a currency code (ISO 4217)' });
export const zone = z.string().max(64).refine(isTimeZone, { error: 'is not a time zone' });
export const locale = z
  .string()
  .regex(/^[a-z]{2,3}(-[A-Z]{2})?$/, { error: 'is not a language tag' });
