import { counted, moneyText, monthText } from '@lib/ui';
import { type Judge, type Need, type ReadAs } from './need';
import { subscription } from './subscription-need';
import { type TodayFacts } from './today-facts';

type CloseTotals = NonNullable<TodayFacts['close']>['totals'];

/** In the order in which an owner would want to be asked. */
export function needsOf(facts: TodayFacts, readAs: ReadAs): Need[] {
  const found = judges.map((judge) => judge(facts, readAs)).filter((need) => need !== undefined);
  return [...found.filter((need) => need.pressing), ...found.filter((need) => !need.pressing)];
}

const rulings: Judge = ({ rulings }) =>
  some(rulings, (count) => ({
    id: 'rulings',
    count,
    words: count === 1 ? 'visit has a ruling to decide' : 'visits have rulings to decide',
    link: '/shop/rulings',
    label: 'Decide',
    pressing: false,
  }));

const unticketed: Judge = ({ unticketed }) =>
  some(unticketed, (count) => ({
    id: 'unticketed',
    count,
    words: count === 1 ? 'visit is not signed off' : 'visits are not signed off',
    link: '/shop/visits',
    query: { state: 'unticketed' },
    label: 'Sign off',
    pressing: false,
  }));

const unplaced: Judge = ({ day }) => {
  const count = day?.unplaced.length ?? 0;
  if (!count) return undefined;
  return {
    id: 'unplaced',
    count,
    words: count === 1 ? 'visit of today has no tech' : 'visits of today have no tech',
    link: '/shop/day-sheet',
    label: 'Assign',
    pressing: true,
  };
};

const close: Judge = ({ close, runs }, { locale, currency }) => {
  const run = runs?.items[0];
  if (run && (run.state === 'held' || run.state === 'failed')) {
    return {
      id: 'run',
      count: 0,
      words: `The close of ${monthText(run.month, locale)} is ${run.state === 'held' ? 'held' : 'stuck'}`,
      link: '/shop/month-close',
      label: 'Look',
      pressing: true,
    };
  }
  if (!close?.mayClose || close.run || isEmpty(close.totals)) return undefined;
  const total = moneyText(close.totals.closing, currency, locale);
  return {
    id: 'close',
    count: 0,
    words: `${monthText(close.month, locale)} can be closed`,
    detail: `${counted(close.totals.stores, 'statement')}, ${total} in all.${unfinishedWords(close)}`,
    link: '/shop/month-close',
    label: 'Close the month',
    pressing: false,
  };
};

/** A month in which nothing was done and nothing is owed need not be closed to be told of. */
function isEmpty({ visits, opening, charged, closing }: CloseTotals): boolean {
  return visits === 0 && opening === 0 && charged === 0 && closing === 0;
}

function unfinishedWords({ unfinished }: NonNullable<TodayFacts['close']>): string {
  const without = unfinished.withoutRecipient.count;
  return without ? ` ${counted(without, 'store')} with nobody to mail it to.` : '';
}

const mails: Judge = ({ failedMails, uncertainMails }) => {
  const lost = failedMails?.count.value ?? 0;
  const unsure = uncertainMails?.count.value ?? 0;
  if (lost + unsure === 0) return undefined;
  const parts = [
    lost ? `${lost} could not be sent` : '',
    unsure ? `${unsure} may have arrived` : '',
  ];
  return {
    id: 'mails',
    count: lost + unsure,
    words: lost + unsure === 1 ? 'mail needs a decision' : 'mails need a decision',
    detail: `${parts.filter(Boolean).join(', ')}.`,
    link: '/shop/mails',
    query: { state: unsure ? 'uncertain' : 'failed' },
    label: 'Settle',
    pressing: true,
  };
};

const overdue: Judge = ({ overdue }, { locale, currency }) =>
  some(overdue, (count) => {
    const { days1To30, days31To60, days61To90, over90 } = overdue?.totals ?? noBuckets;
    const sum = days1To30 + days31To60 + days61To90 + over90;
    return {
      id: 'overdue',
      count,
      words: count === 1 ? 'store is overdue' : 'stores are overdue',
      detail: `${moneyText(sum, currency, locale)} past its due date.`,
      link: '/shop/receivables',
      query: { overdue: 'true' },
      label: 'See who owes',
      pressing: true,
    };
  });

const noBuckets = { days1To30: 0, days31To60: 0, days61To90: 0, over90: 0 };

const imports: Judge = ({ imports }) => {
  const waiting = (imports?.items ?? []).filter(({ state }) => state === 'checked');
  const [first] = waiting;
  if (!first) return undefined;
  const bad = first.counts.bad;
  return {
    id: 'imports',
    count: waiting.length,
    words: waiting.length === 1 ? 'import waits' : 'imports wait',
    detail: bad
      ? `${first.fileName} has ${counted(bad, 'row')} to put right.`
      : `${first.fileName} is checked and can be applied.`,
    link: waiting.length === 1 ? `/shop/imports/${first.id}` : '/shop/imports',
    label: 'Open',
    pressing: false,
  };
};

const invitations: Judge = ({ invitations }) =>
  some(invitations, (count) => ({
    id: 'invitations',
    count,
    words: count === 1 ? 'invitation has run out' : 'invitations have run out',
    link: '/shop/crew',
    label: 'Mail again',
    pressing: false,
  }));

const judges: readonly Judge[] = [
  subscription,
  unplaced,
  mails,
  overdue,
  rulings,
  unticketed,
  close,
  imports,
  invitations,
];

function some(
  list: { readonly count: { readonly value: number } } | undefined,
  need: (count: number) => Need,
): Need | undefined {
  const count = list?.count.value ?? 0;
  return count > 0 ? need(count) : undefined;
}
