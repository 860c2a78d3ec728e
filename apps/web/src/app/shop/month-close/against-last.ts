import { type StoreToClose } from './month-close-api';

/** Within this share of last month's charges a month is as usual. */
const usualBand = 0.25;

export interface Against {
  readonly words: string;
  /** Something to look at before it is sent. */
  readonly look: boolean;
}

type Compared = Pick<StoreToClose, 'visits' | 'charged' | 'tax' | 'lastMonth' | 'unusual'>;

/** How a store's month compares with its last, in as few words as a column has room for. */
export function againstLast(store: Compared, lastMonthName: string): Against {
  const last = store.lastMonth;
  if (!last) return { words: 'first statement', look: false };
  const before = last.charged + last.tax;
  const now = store.charged + store.tax;
  if (store.unusual) {
    return { words: `${Math.floor(now / before)} times ${lastMonthName}: look`, look: true };
  }
  const visits = store.visits - last.visits;
  if (visits !== 0) return { words: visitsWords(visits), look: false };
  if (Math.abs(now - before) <= usualBand * before) return { words: 'as usual', look: false };
  const share = before > 0 ? Math.round((Math.abs(now - before) / before) * 100) : 0;
  if (!share) return { words: 'nothing in the last', look: false };
  return { words: `${share} % ${now > before ? 'more' : 'less'}`, look: false };
}

function visitsWords(more: number): string {
  const count = Math.abs(more);
  return `${more > 0 ? '+' : '−'} ${count} ${count === 1 ? 'visit' : 'visits'}`;
}
