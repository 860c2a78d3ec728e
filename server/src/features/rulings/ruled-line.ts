import { type PricedLine, type Ruling } from '@lib/domain';

/** A line of the visit with what the rules propose for it, and what both rest on. */
export interface RuledLine extends PricedLine {
  proposal: Ruling;
  basis: string;
}
