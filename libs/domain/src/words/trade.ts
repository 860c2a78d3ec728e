/**
 * The closed sets of words that the computation speaks in. They are the same strings as in the
 * contracts and in the database, so nothing is translated on the way.
 */
export type MachineKind =
  'top_loader' | 'front_loader' | 'dryer' | 'stacked_pair' | 'extractor' | 'changer' | 'heater';

export type Energy = 'electric' | 'gas' | 'steam';

/** Who bears the cost of a line. */
export type Bearer = 'store' | 'shop' | 'supplier' | 'contract' | 'goodwill';

export type Cause =
  | 'wear'
  | 'age'
  | 'misuse'
  | 'vandalism'
  | 'supply'
  | 'installation'
  | 'defective_part'
  | 'shop_error'
  | 'nothing_found';

export type JobResult = 'put_right' | 'made_safe' | 'unfinished' | 'nothing_found' | 'replaced';

export type LineKind = 'trip' | 'labour' | 'access' | 'part' | 'fee' | 'late_charge';

/** What the tech marked on the spot. */
export type WarrantyMark = 'none' | 'shop_warranty' | 'own_mistake';

export type PartSource = 'shelf' | 'van' | 'storeroom' | 'ordered' | 'salvaged';

export const BEARERS: readonly Bearer[] = ['store', 'shop', 'supplier', 'contract', 'goodwill'];
