export { BearerLabel } from './notes/bearer-label';
export { Callout } from './notes/callout';
export { ChoiceChips, type Choice } from './choices/choice-chips';
export { choicesOf } from './choices/choices-of';
export { CountStepper } from './choices/count-stepper';
export { FieldError, errorText } from './choices/field-error';
export { EmptyNote } from './notes/empty-note';
export { type FloorBank, type FloorBay, type FloorChoice } from './floor/floor-bay';
export { floorOf } from './floor/floor-of';
export { FloorPlan } from './floor/floor-plan';
export { FormNotes } from './notes/form-notes';
export { ChoiceFilter } from './list/choice-filter';
export { ListShell } from './list/list-shell';
export {
  type ListAsk,
  type ListControls,
  type ListPage,
  ListState,
  listState,
} from './list/list-state';
export { MachineGlyph } from './machine-glyph/machine-glyph';
export { StateMark } from './machine-glyph/state-mark';
export { LoadNote, type Loadable } from './notes/load-note';
export { MoneyText } from './format/money-text';
export { amountField, amountFrom, currencySign, moneyText } from './format/money';
export { PageHead } from './head/page-head';
export { SectionHead } from './head/section-head';
export { ProblemNote } from './notes/problem-note';
export { problemText } from './notes/problem-text';
export { ProgressLine } from './notes/progress-line';
export { Reading } from './format/reading';
export { StatusLine } from './notes/status-line';
export { TicketCard } from './ticket/ticket-card';
export { ClockPipe, DayPipe, InstantPipe, MinutesPipe, MonthPipe } from './format/time-pipes';
export {
  clockText,
  dayIn,
  dayText,
  instantText,
  minutesText,
  monthText,
  timeText,
} from './format/times';
export {
  type Colour,
  colours,
  type ContrastPair,
  contrastPairs,
  type Copy,
  copyEdges,
  type SchemePair,
} from './tokens/tokens';
export { conditionWords, type ConditionWords } from './words/condition-words';
export { counted, labelFor, LabelPipe, wordFor, WordPipe } from './words/words';
export { AmountField } from './fields/amount-field';
export { AmountInput } from './fields/amount-input';
export { CheckField } from './fields/check-field';
export { DistanceField } from './fields/distance-field';
export { FindField } from './fields/find-field';
export { NumberField } from './fields/number-field';
export { PercentField } from './fields/percent-field';
export { SelectField } from './fields/select-field';
export { TextField } from './fields/text-field';
export { WordsField } from './fields/words-field';
export { distanceText, distanceUnit, percentText } from './fields/measures';
