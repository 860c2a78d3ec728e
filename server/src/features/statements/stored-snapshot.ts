import { type StatedVisit } from '@lib/contracts';
import { type StatementSnapshot } from '@lib/domain';

/** What a statement keeps: the figures, and the visits behind them. Hashed as one. */
export type StoredSnapshot = StatementSnapshot & { visits: StatedVisit[] };
