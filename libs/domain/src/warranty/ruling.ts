import { type Bearer } from '../words/trade';

/** Why a line is somebody's to bear. Stable: rulings are kept with their codes. */
export const REASON_CODES = [
  'never_warranted',
  'marked_own_mistake',
  'cause_shop_error',
  'marked_shop_warranty',
  'mark_has_no_record',
  'mark_contradicted',
  'nothing_found',
  'cause_excluded',
  'caused_by_job',
  'follows_causing_job',
  'causing_job_out_of_warranty',
  'causing_job_on_other_machine',
  'supplier_warranty_on_part',
  'supplier_warranty_on_machine',
  'supplier_warranty_not_for_cause',
  'supplier_warranty_over',
  'part_in_warranty',
  'part_out_of_warranty',
  'labour_in_warranty',
  'labour_out_of_warranty',
  'callback',
  'callback_left_open',
  'contract_covers',
  'contract_does_not_cover',
  'trip_follows_job',
  'own_part_of_store',
  'nothing_applies',
  'above_confirm_limit',
] as const;

export type ReasonCode = (typeof REASON_CODES)[number];

export interface Reason {
  code: ReasonCode;
  /** The facts the words are made of. */
  params: Readonly<Record<string, string | number>>;
  /** One sentence for the owner. */
  words: string;
  /** True for the reason the proposal rests on. */
  decides: boolean;
}

/** The engine's proposal; the owner confirms or overrules it. */
export interface Ruling {
  bearer: Bearer;
  /** In the order they were weighed. */
  reasons: Reason[];
  /** False when the line may go through without the owner looking at it. */
  needsConfirmation: boolean;
}

/** What a bearer would mean in figures, in minor units. */
export interface Outcome {
  bearer: Bearer;
  /** What the store would pay, before tax. */
  charged: number;
  /** What the shop would be left with. */
  ourCost: number;
  /** What the shop would claim from its supplier. */
  claimed: number;
}
