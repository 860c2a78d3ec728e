import { type Bearer, BEARERS } from '../words/trade';
import { type Outcome } from './ruling';

/**
 * What each bearer would mean for a line in figures, so that the owner decides with them in view.
 * A claim on the supplier counts as made good; before tax.
 */
export function otherOutcomes(line: { list: number; cost: number }): Outcome[] {
  return BEARERS.map((bearer) => outcomeFor(line, bearer));
}

function outcomeFor(line: { list: number; cost: number }, bearer: Bearer): Outcome {
  return {
    bearer,
    charged: bearer === 'store' ? line.list : 0,
    ourCost: bearer === 'store' || bearer === 'supplier' ? 0 : line.cost,
    claimed: bearer === 'supplier' ? line.cost : 0,
  };
}
