import { type TodayFacts } from './today-facts';

/** Something that waits for somebody now. */
export interface Need {
  readonly id: string;
  /** The figure it is about; 0 where there is none. */
  readonly count: number;
  readonly words: string;
  readonly detail?: string;
  readonly link: string;
  readonly query?: Readonly<Record<string, string>>;
  readonly label: string;
  /** Costs money or trust the longer it waits. */
  readonly pressing: boolean;
}

export interface ReadAs {
  readonly locale: string;
  readonly currency: string;
  /** The trade day. */
  readonly today: string;
}

export type Judge = (facts: TodayFacts, readAs: ReadAs) => Need | undefined;
