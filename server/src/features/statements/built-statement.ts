import { type IsoDate, type Month } from '@lib/domain';
import { type StoredSnapshot } from './stored-snapshot';

/** What is the same for every store of a run. */
export interface RunFacts {
  id: string;
  month: Month;
  revision: number;
  /** The day all its statements are dated, whenever they come to be built. */
  issuedOn: IsoDate;
  /** Months it takes in: usually one, more when some were left out. */
  months: Month[];
}

export interface StoreToState {
  /** Of its row of the run. */
  rowId: string;
  id: string;
  name: string;
  address: string;
  clientId: string;
  clientName: string;
  termsDays: number | null;
}

export interface BuiltStatement {
  id: string;
  number: number;
  store: StoreToState;
  snapshot: StoredSnapshot;
}
