import { type AnswerOf } from '@lib/contracts/web';

/** A visit with all a tech needs on the spot. */
export type Sheet = AnswerOf<'visits.sheet'>;
export type SheetJob = Sheet['jobs'][number];
export type SheetMachine = Sheet['machines'][number];
export type SheetCall = Sheet['calls'][number];
export type EarlierJob = Sheet['earlierJobs'][number];

export interface KeptSheet {
  readonly visitId: string;
  /** When the server was asked for it, by the device's clock. */
  readonly askedAt: string;
  readonly sheet: Sheet;
}

export interface KeptDay {
  readonly on: string;
  readonly askedAt: string;
  readonly visitIds: readonly string[];
}

/** A photo until the server has it. */
export interface KeptPhoto {
  readonly id: string;
  readonly visitId: string;
  readonly jobId: string;
  readonly name: string;
  readonly content: Blob;
  /** The server has it; the act that names it may still wait. */
  readonly uploaded: boolean;
}

/** What the device knows of a part of the book, to find it without a signal. */
export interface KeptPart {
  readonly id: string;
  readonly number: string;
  readonly name: string;
  readonly category: string;
  readonly scarce: boolean;
  readonly successor: { readonly id: string; readonly number: string } | null;
}
