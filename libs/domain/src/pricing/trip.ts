import { type TripRule } from './edition';
import { PriceBookGap } from './price-book-gap';
import { type StorePosition } from './visit';

/**
 * The trip rule that holds for a store: the closest of those that agree with it, the first of
 * equals. A rule with a distance doesn't hold for a store whose distance isn't known.
 *
 * @throws PriceBookGap when no rule holds: a trip for nothing must be somebody's decision
 */
export function tripRuleFor(rules: readonly TripRule[], store: StorePosition): TripRule {
  let closest: TripRule | undefined;
  for (const rule of rules) {
    if (holds(rule, store) && (!closest || isCloser(rule, closest))) closest = rule;
  }
  if (!closest) {
    throw new PriceBookGap('no_trip_rule', 'The price book has no trip rule for this store');
  }
  return closest;
}

function holds(rule: TripRule, store: StorePosition): boolean {
  if (rule.place != null && rule.place !== store.place) return false;
  if (rule.zone != null && rule.zone !== store.zone) return false;
  if (rule.upToMetres == null) return true;
  return store.metres != null && store.metres <= rule.upToMetres;
}

function isCloser(rule: TripRule, than: TripRule): boolean {
  const closeness = namesClose(rule) - namesClose(than);
  if (closeness !== 0) return closeness > 0;
  return (rule.upToMetres ?? Infinity) < (than.upToMetres ?? Infinity);
}

function namesClose(rule: TripRule): number {
  return (rule.place != null ? 2 : 0) + (rule.zone != null ? 1 : 0);
}
