import { type Bearer } from '../words/trade';
import { type LineToRule, type RulingContext } from './case';
import { type ReasonCode } from './ruling';

/** One instance of a rule: what is ruled on, who bears it, on which reason, and whether it asks. */
export type RulingRow = [
  name: string,
  line: LineToRule,
  context: RulingContext,
  bearer: Bearer,
  decidedBy: ReasonCode,
  owner: 'asks' | 'goes through',
];
