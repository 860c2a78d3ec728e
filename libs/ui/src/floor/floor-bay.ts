import { type MachineKind, type MachineState } from '@lib/contracts/web';

/** One bay of a bank as the floor draws it; `machine` is absent for an empty bay. */
export interface FloorBay {
  readonly id: string;
  /** "A-04" */
  readonly label: string;
  readonly kind: MachineKind;
  readonly state: MachineState;
  /** What a person should know of it, in one line: "Kestrel TL-9, down since Tuesday". */
  readonly note?: string;
}

export interface FloorBank {
  readonly id: string;
  /** "A", or "Bank by the window" */
  readonly name: string;
  readonly bays: readonly FloorBay[];
}

export type FloorChoice = 'none' | 'one' | 'many';
