import { type Part } from './parts-api';

/** What a person should know before ordering or fitting it: "scarce", "use DL-3 instead". */
export function partNotes(part: Part): string[] {
  return [
    part.successor ? `use ${part.successor.number} instead` : '',
    part.scarce ? 'scarce' : '',
    part.makersPart ? '' : 'equivalent',
    part.endedAt ? 'ended' : '',
  ].filter(Boolean);
}
