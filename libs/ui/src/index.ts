export { BearerLabel } from './notes/bearer-label';
export { Callout } from './notes/callout';
export { ChoiceChips, type Choice } from './choices/choice-chips';
export { choicesOf } from './choices/choices-of';
export { CountStepper } from './choices/count-stepper';
export { FieldError } from './choices/field-error';
export { EmptyNote } from './notes/empty-note';
export { type FloorBank } from './floor/floor-bay';
export { floorOf } from './floor/floor-of';
export { FloorPlan } from './floor/floor-plan';
export { FormNotes } from './notes/form-notes';
export { ChoiceFilter } from './list/choice-filter';
export { ListShell } from './list/list-shell';
export { listState } from './list/list-state';
export { MachineGlyph } from './machine-glyph/machine-glyph';
export { StateMark } from './machine-glyph/state-mark';
export { LoadNote } from './notes/load-note';
export { MoneyText } from './format/money-text';
export { currencySign, moneyText } from './format/money';
export { PageHead } from './head/page-head';
export { SectionHead } from './head/section-head';
export { ProblemNote } from './notes/problem-note';
export { problemText } from './notes/problem-text';
export { ProgressLine } from './notes/progress-line';
export { Reading } from './format/reading';
export { TicketCard } from './ticket/ticket-card';
export { ClockPipe, DayPipe, InstantPipe, MonthPipe } from './format/time-pipes';
export {
  clockText,
  dayIn,
  dayText,
  instantText,
  minutesText,
  monthText,
  timeText,
} from './format/times';
export { conditionWords } from './words/condition-words';
export { counted, labelFor, LabelPipe, wordFor, WordPipe } from './words/words';
export { AmountField } from './fields/amount-field';
export { CheckField } from './fields/check-field';
export { DistanceField } from './fields/distance-field';
export { FindField } from './fields/find-field';
export { NumberField } from './fields/number-field';
export { PercentField } from './fields/percent-field';
export { SelectField } from './fields/select-field';
export { TextField } from './fields/text-field';
export { WordsField } from './fields/words-field';
export { distanceText, distanceUnit, percentText } from './fields/measures';
