/**
 * The accounts a shop's entries are posted to, with their place in a book of accounts.
 *
 * - `unbilled`: work signed off that stands on no statement yet; `receivable`: stated and owed.
 *   A store's open balance is the sum of its `receivable` entries.
 * - `absorbed_cost` and `absorbed_offset` always move together: they keep what the shop's own
 *   mistakes and goodwill cost it in the books, without touching what stores owe.
 */
export const accountGroups = {
  unbilled: 'assets',
  receivable: 'assets',
  card_clearing: 'assets',
  bank: 'assets',
  tax_payable: 'liabilities',
  revenue_trip: 'revenues',
  revenue_labour: 'revenues',
  revenue_parts: 'revenues',
  revenue_contract: 'revenues',
  revenue_late: 'revenues',
  write_off: 'expenses',
  absorbed_cost: 'expenses',
  absorbed_offset: 'expenses',
} as const;

export type AccountCode = keyof typeof accountGroups;

export const accountCodes = Object.keys(accountGroups) as readonly AccountCode[];
