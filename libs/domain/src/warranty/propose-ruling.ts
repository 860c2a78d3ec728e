import { type LineToRule, type RulingContext } from './case';
import {
  weighBareMark,
  weighCallback,
  weighContract,
  weighRest,
  weighShopWarranty,
  weighSupplier,
} from './cover-rules';
import {
  isNothingFound,
  weighCausingJob,
  weighConsequence,
  weighExclusion,
  weighMark,
  weighNeverWarranted,
  weighNothingFound,
} from './fault-rules';
import { type Ruling } from './ruling';
import { Weighing } from './weighing';

/**
 * Who is to bear a line, with the reasons in the order they were weighed. The owner confirms or
 * overrules; nothing is decided here. The order of the rules is the policy:
 *
 * 1. The shop's own mistake is the shop's, with everything that belongs to the job.
 * 2. Fees are the store's; a spare of the store's own is charged to nobody.
 * 3. Nothing found: a contract that covers it, else the shop's rule.
 * 4. Causes that the warranty leaves out (misuse, vandalism, supply) are the store's.
 * 5. A defective part within its supplier's warranty is the supplier's, the part only.
 * 6. What an earlier job brought about follows that job.
 * 7. A part the shop fitted, or labour it did on what failed, within its warranty is the shop's.
 * 8. A return for the same fault within the callback window is the shop's, parts excepted.
 * 9. What a contract covers is the contract's.
 * 10. The tech's mark of shop warranty where the record is silent.
 * 11. The store.
 *
 * The trip's share is weighed as the job's labour is, except that a contract may cover the one and
 * not the other. Days count from sign-off, the last one included.
 *
 * The owner is asked about own mistakes, consequences, callbacks, marks that the record doesn't
 * bear out, and whatever others than the store bear above the shop's limit.
 *
 * @throws RangeError for a date that does not exist
 */
export function proposeRuling(line: LineToRule, context: RulingContext): Ruling {
  const weighing = new Weighing(line, context);
  if (line.kind === 'fee' || line.kind === 'late_charge') {
    weighNeverWarranted(weighing);
    return weighing.ruling();
  }
  weighMark(weighing);
  weighNeverWarranted(weighing);
  if (weighing.decided && !context.job.causedBy) return finished(weighing);
  weighCausingJob(weighing);
  if (isNothingFound(weighing)) weighContract(weighing);
  weighNothingFound(weighing);
  weighExclusion(weighing);
  if (context.job.cause === 'defective_part') weighSupplier(weighing);
  weighConsequence(weighing);
  if (context.job.cause !== 'defective_part') weighSupplier(weighing);
  weighShopWarranty(weighing);
  weighCallback(weighing);
  weighContract(weighing);
  weighBareMark(weighing);
  weighRest(weighing);
  return finished(weighing);
}

function finished(weighing: Weighing): Ruling {
  const { bearer, line, context } = weighing;
  const agreesWithMark = bearer === 'shop' || bearer === 'supplier' || line.list === 0;
  if (context.job.mark === 'shop_warranty' && !agreesWithMark) weighing.askOwner();
  if (weighing.line.kind === 'trip') {
    weighing.note('trip_follows_job', {}, 'The share of the trip goes with the job.');
  }
  return weighing.ruling();
}
