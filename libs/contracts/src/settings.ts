import { z } from 'zod';
import { defineOperations } from './operation';
import { email, id, line, phone, words } from './text';
import { basisPoints, currency, instant, locale, version, zone } from './values';

/** How days are counted for a late charge. */
export const lateChargeDayCount = z.enum(['actual_365', '30_360']);

const mutableSettings = {
  name: line(120),
  /** Only while no ticket is signed off: amounts that stand cannot change their meaning. */
  currency,
  zone,
  locale,
  address: words(300),
  taxNumber: line(40, 0),
  phone: phone.or(z.literal('')),
  /** The name mails come from; empty: the shop's name. */
  mailName: line(80, 0),
  /** Where answers to mails go; null: nowhere in particular. */
  replyTo: email.nullable(),
  /** The day of the next month on which a month is closed, 1 to 28. */
  statementDay: z.int().min(1).max(28),
  /** The hour of that day, on the shop's clock. */
  statementHour: z.int().min(0).max(23),
  closeBySchedule: z.boolean(),
  /** Days after its date that a statement falls due. */
  termsDays: z.int().min(0).max(120),
  /** A year's charge on overdue balances; 0 for none. */
  lateChargeBasisPoints: basisPoints.max(10_000),
  lateChargeDayCount,
};

export const shopSettings = z.object({
  id,
  name: z.string(),
  currency: z.string(),
  /** Whether a ticket stands, after which the currency is for good. */
  currencyFixed: z.boolean(),
  zone: z.string(),
  locale: z.string(),
  address: z.string(),
  taxNumber: z.string(),
  phone: z.string(),
  mailName: z.string(),
  replyTo: z.string().nullable(),
  statementDay: z.int(),
  statementHour: z.int(),
  closeBySchedule: z.boolean(),
  termsDays: z.int(),
  lateChargeBasisPoints: z.int(),
  lateChargeDayCount,
  /** Whether clients can pay by card: the shop's account with the card payment service is connected. */
  takesCards: z.boolean(),
  /** When the owner went through the first settings; null: not yet. */
  setUpAt: instant.nullable(),
  version,
});

export const settingsOperations = defineOperations({
  'shop.show': {
    method: 'GET',
    path: '/api/shop',
    summary: "The shop's settings",
    permission: 'settings.read',
    answer: shopSettings,
  },
  'shop.change': {
    method: 'PATCH',
    path: '/api/shop',
    summary: "Change some of the shop's settings",
    permission: 'settings.change',
    ifMatch: true,
    body: z.strictObject(mutableSettings).partial(),
    answer: shopSettings,
    problems: ['conflict'],
  },
  'settings.finishSetUp': {
    method: 'POST',
    path: '/api/shop/set-up',
    summary: 'Note that the first settings are made, so that nobody is led through them again',
    permission: 'settings.change',
    idempotency: 'natural',
    answer: shopSettings,
    status: 200,
  },
});
