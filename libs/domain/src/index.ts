export {
  type Instant,
  type IsoDate,
  type Month,
  type TimeOfDay,
  isIsoDate,
  isMonth,
  isTimeOfDay,
  isTimeZone,
} from './calendar/iso';
export * from './calendar/month';
export * from './calendar/trade-day';
export * from './ledger/accounts';
export * from './ledger/charge-postings';
export * from './ledger/journal-text';
export {
  type DocumentKind,
  type LedgerDocument,
  type Posting,
  balanced,
  reversed,
} from './ledger/posting';
export * from './ledger/settlement-postings';
export * from './ledger/trial-balance';
