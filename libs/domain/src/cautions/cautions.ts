import { type Energy, type MachineKind } from '../words/trade';

export type CautionCode =
  | 'isolate'
  | 'lock_and_tag'
  | 'close_gas_cock'
  | 'close_steam_valve'
  | 'close_water'
  | 'discharge_capacitors'
  | 'prove_dead'
  | 'let_cool'
  | 'block_drum'
  | 'stand_safely'
  | 'standing_water';

export interface Caution {
  code: CautionCode;
  /** What to do, for the job sheet. */
  words: string;
  /** Where it comes from; null for good practice of the trade. */
  source: string | null;
}

/** Stands with every list of cautions and every electrical or gas result. */
export const localCodeNotice =
  'These are reminders and permit nothing. The local code, the maker’s instructions and licensed ' +
  'practice decide what may be done here, and by whom. In doubt, leave it locked out and say so.';

const osha = (paragraph: string) => `OSHA 29 CFR 1910.147${paragraph}`;

interface Rule extends Caution {
  holds(kind: MachineKind, energy: Energy): boolean;
}

const washers: readonly MachineKind[] = ['top_loader', 'front_loader', 'stacked_pair', 'extractor'];
const turning: readonly MachineKind[] = [...washers, 'dryer'];
/** Drives and power supplies in these kinds hold a charge after they are switched off. */
const charged: readonly MachineKind[] = [...turning, 'changer'];
const hot: readonly MachineKind[] = ['dryer', 'stacked_pair', 'heater'];
const heavy: readonly MachineKind[] = [...turning, 'heater'];
const wet: readonly MachineKind[] = [...washers, 'heater'];

/**
 * In the sequence of OSHA 1910.147(d): shut off and isolate, lock and tag, relieve what is stored,
 * then prove it; only then what the machine itself may do to the person before it. Every kind has
 * electric controls, so the electrical cautions hold for gas and steam as well.
 */
const rules: readonly Rule[] = [
  {
    code: 'isolate',
    words:
      'Shut the machine down and isolate it from every supply, at its own disconnect or by ' +
      'pulling its plug.',
    source: osha('(d)(2)-(3)'),
    holds: () => true,
  },
  {
    code: 'lock_and_tag',
    words:
      'Put your own lock and tag on each isolating device. A pulled plug stays in your sight ' +
      'and in your control.',
    source: osha('(d)(4) and (a)(2)(iii)(A)'),
    holds: () => true,
  },
  {
    code: 'close_gas_cock',
    words: 'Close the gas cock and lock it. Smell gas: open up, no switches, everybody out, call.',
    source: osha('(d)(3)-(4)'),
    holds: (_, energy) => energy === 'gas',
  },
  {
    code: 'close_steam_valve',
    words: 'Close and lock the steam valve, and let the line drain and lose its pressure.',
    source: osha('(d)(3)-(5)'),
    holds: (_, energy) => energy === 'steam',
  },
  {
    code: 'close_water',
    words: 'Close the water and relieve the pressure in the hoses.',
    source: osha('(d)(5)'),
    holds: (kind) => wet.includes(kind),
  },
  {
    code: 'discharge_capacitors',
    words:
      'Wait as long as the maker states for capacitors to discharge; a drive holds a deadly ' +
      'charge after it is switched off.',
    source: osha('(d)(5)(i)'),
    holds: (kind) => charged.includes(kind),
  },
  {
    code: 'prove_dead',
    words:
      'Prove it dead: try the start control, then measure with a tester proved on a live source ' +
      'before and after.',
    source: osha('(d)(6)'),
    holds: () => true,
  },
  {
    code: 'let_cool',
    words: 'Let hot surfaces cool: drum, heater, burner, pipes and exhaust.',
    source: osha('(d)(5)(i)'),
    holds: (kind, energy) => hot.includes(kind) || energy !== 'electric',
  },
  {
    code: 'block_drum',
    words: 'The drum can turn by itself: block it, and keep hands out of belts and springs.',
    source: osha('(d)(5)(i)'),
    holds: (kind) => turning.includes(kind),
  },
  {
    code: 'stand_safely',
    words: 'Stand the machine safely before reaching in or under. Two people move or tilt it.',
    source: null,
    holds: (kind) => heavy.includes(kind),
  },
  {
    code: 'standing_water',
    words: 'Standing water and electricity kill: dry the floor before you kneel or measure.',
    source: null,
    holds: (kind) => wet.includes(kind),
  },
];

/**
 * The usual cautions before covers come off, in the order they are taken. Advice only: it never
 * says that something may be done, and stands with `localCodeNotice`.
 *
 * @param energy what heats the machine; its controls are electric in any case
 */
export function cautionsFor(kind: MachineKind, energy: Energy): Caution[] {
  return rules
    .filter((rule) => rule.holds(kind, energy))
    .map(({ code, words, source }) => ({ code, words, source }));
}
