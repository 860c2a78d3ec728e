export interface ConfirmQuestion {
  readonly heading: string;
  /** What will happen, in figures: "9 visits and 3 open calls of this store are cancelled." */
  readonly consequence: string;
  /** The verb of the button that goes on: "Cancel the visits". */
  readonly action: string;
  readonly stay?: string;
  readonly destructive?: boolean;
}
