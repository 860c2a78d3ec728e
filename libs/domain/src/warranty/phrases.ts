import { type Bearer, type Cause, type LineKind, type MachineKind } from '../words/trade';

/** Words of the reasons; each reads as part of a sentence. */
export const causeWords: Readonly<Record<Cause, string>> = {
  wear: 'wear',
  age: 'age',
  misuse: 'misuse',
  vandalism: 'vandalism',
  supply: 'the supply of power, gas, water or drain',
  installation: 'how the machine was installed',
  defective_part: 'a defective part',
  shop_error: 'our own mistake',
  nothing_found: 'nothing found',
};

export const bearerWords: Readonly<Record<Bearer, string>> = {
  store: 'the store',
  shop: 'the shop',
  supplier: 'the supplier',
  contract: 'the contract',
  goodwill: 'the shop, as goodwill',
};

export const lineWords: Readonly<Record<LineKind, string>> = {
  trip: 'the trip',
  labour: 'labour',
  access: 'access',
  part: 'parts',
  fee: 'fees',
  late_charge: 'late charges',
};

export const machineWords: Readonly<Record<MachineKind, string>> = {
  top_loader: 'top loaders',
  front_loader: 'front loaders',
  dryer: 'dryers',
  stacked_pair: 'stacked pairs',
  extractor: 'extractors',
  changer: 'changers',
  heater: 'heaters',
};

export function days(count: number): string {
  return count === 1 ? '1 day' : `${count} days`;
}

/** "12 days earlier", "the same day". */
export function daysEarlier(count: number): string {
  return count === 0 ? 'the same day' : `${days(count)} earlier`;
}

export function capitalised(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
