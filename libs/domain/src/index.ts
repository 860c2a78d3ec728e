export {
  type Instant,
  type IsoDate,
  type Month,
  type TimeOfDay,
  isIsoDate,
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
export * from './words/document-name';
export * from './words/found-and-done';
export * from './words/symptoms';
export * from './words/trade';
export {
  type Integer,
  type RoundingMode,
  multiplyDivide,
  roundFraction,
  roundHalfEven,
  roundHalfUp,
  roundToStep,
} from './money/rounding';
export * from './money/share';
export * from './money/currency';
export * from './money/amount';
export * from './tax/rate';
export * from './tax/tax';
export * from './totals/document-totals';
export * from './totals/broken-rules';
export * from './pricing/edition';
export * from './pricing/visit';
export * from './pricing/price-book-gap';
export * from './pricing/trip';
export * from './pricing/price-visit';
export * from './pricing/bill-ticket';
export * from './warranty/case';
export * from './warranty/ruling';
export * from './warranty/propose-ruling';
export * from './warranty/outcomes';
export * from './statement/build-statement';
export * from './statement/canonical-json';
export * from './statement/check-statement';
export * from './statement/creditor-reference';
export * from './statement/snapshot';
export * from './calendar/prorate';
export * from './receivables/ageing';
export * from './receivables/allocate-payment';
export * from './receivables/late-charge';
export * from './recurrence/describe-rule';
export * from './recurrence/occurrences';
export { RuleError, parseRule } from './recurrence/rule-parts';
export * from './recurrence/shift-for-holidays';
export * from './recurrence/validate-rule';
export * from './cautions/cautions';
export * from './downtime/takings';
export * from './csv/csv-row';
export * from './csv/formula-cell';
export * from './contrast/contrast';
export * from './signin/password-verdict';
export * from './subscription/plan-limits';
export * from './subscription/subscription-state';
