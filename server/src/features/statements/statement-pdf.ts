import {
  decimalFromAmount,
  formatMoney,
  foundAndDone,
  minorDigits,
  printedRfReference,
  type StatementLine,
} from '@lib/domain';
import { type StatedVisit } from '@lib/contracts';
import { type Cell, Sheet } from '../../core/documents/sheet';
import { dayName, monthName } from './document-names';
import { type StoredSnapshot } from './stored-snapshot';

/** All that a printed statement says: a snapshot, and who sends it. */
export interface StatementSheet {
  shop: {
    name: string;
    address: string;
    phone: string;
    taxNumber: string;
    locale: string;
  };
  snapshot: StoredSnapshot;
}

const soft = '#5a6172';
const carbon = '#3a3f9c';
const letterCountries = ['US', 'CA', 'MX', 'PH', 'CL', 'CO'];

/** A statement as a tagged PDF. The same statement gives the same bytes. */
export function statementPdf({ shop, snapshot }: StatementSheet): Promise<Buffer> {
  const { locale } = shop;
  const month = monthName(snapshot.period, locale);
  const sheet = new Sheet({
    title: `Statement ${snapshot.number}, ${snapshot.store.name}, ${month}`,
    author: shop.name,
    lang: locale,
    created: new Date(`${snapshot.date}T00:00:00Z`),
    size: letterCountries.includes(locale.slice(-2)) ? 'LETTER' : 'A4',
  });
  head(sheet, shop, snapshot, month);
  balance(sheet, snapshot, locale);
  lines(sheet, snapshot, locale);
  return sheet.end((page, pages) =>
    [shop.name, shop.taxNumber, snapshot.number, `page ${page} of ${pages}`]
      .filter((part) => part !== '')
      .join('  |  '),
  );
}

function head(
  sheet: Sheet,
  shop: StatementSheet['shop'],
  snapshot: StoredSnapshot,
  month: string,
): void {
  sheet.rule(carbon, 3);
  sheet.space(10);
  sheet.say('P', shop.name, { size: 12, weight: 600 });
  const from = [...shop.address.split('\n'), shop.phone].map((line) => line.trim());
  const address = from.filter((line) => line !== '').join(', ');
  if (address) sheet.say('P', address, { color: soft });
  sheet.space(18);
  sheet.say('H1', `Statement for ${month}`, { size: 20, weight: 600 });
  sheet.space(4);
  const { store } = snapshot;
  sheet.say('P', store.name, { size: 12, weight: 600 });
  const to = [store.clientName ?? '', ...(store.address ?? [])].filter((line) => line !== '');
  if (to.length) sheet.say('P', to.join(', '), { color: soft });
  sheet.space(14);
}

function balance(sheet: Sheet, snapshot: StoredSnapshot, locale: string): void {
  const { currency, sums, closing } = snapshot;
  const money = (amount: number) =>
    formatMoney(amount, currency, locale).replace('\u202f', '\u00a0');
  const toPay =
    closing > 0
      ? `${money(closing)} to pay by ${dayName(snapshot.dueOn, locale)}`
      : closing === 0
        ? 'Nothing to pay'
        : `Nothing to pay: ${money(-closing)} in your favour`;
  sheet.say('P', toPay, { size: 14, weight: 600, color: carbon });
  sheet.space(10);
  const facts: [string, string][] = [
    ['Statement', snapshot.number],
    ['Date', dayName(snapshot.date, locale)],
    ['Payment reference', printedRfReference(snapshot.reference)],
    ['Balance before', money(snapshot.opening)],
    ['Paid', money(-sums.paid)],
    ['Charged', money(sums.charged)],
    ['Tax', money(sums.tax)],
    ['Balance now', money(closing)],
    ['Borne by us, not charged', money(sums.borneByShop)],
  ];
  if (sums.credited !== 0) facts.splice(5, 0, ['Credited', money(-sums.credited)]);
  const label = { x: sheet.left, width: 150, color: soft };
  const value = { x: sheet.left + 150, width: 170, align: 'right' as const };
  sheet.table(
    [
      { ...label, text: 'At a glance' },
      { ...value, text: '' },
    ],
    facts.map(([name, text]) => ({
      cells: [
        { ...label, text: name },
        { ...value, text, weight: name === 'Balance now' ? (600 as const) : (400 as const) },
      ],
    })),
  );
  sheet.space(18);
}

/** Where the columns of the lines stand. */
function columns(sheet: Sheet) {
  const amount = 62;
  const words = sheet.width - 70 - 52 - 3 * amount - 8;
  const at = (offset: number, width: number) => ({ x: sheet.left + offset, width });
  return {
    date: at(0, 66),
    reference: at(70, 48),
    words: at(122, words - 8),
    inner: at(134, words - 20),
    charged: { ...at(122 + words, amount), align: 'right' as const },
    tax: { ...at(122 + words + amount, amount), align: 'right' as const },
    total: { ...at(122 + words + 2 * amount, amount), align: 'right' as const },
  };
}

function lines(sheet: Sheet, snapshot: StoredSnapshot, locale: string): void {
  const { currency, sums } = snapshot;
  const column = columns(sheet);
  const plain = plainAmounts(currency, locale);
  const title = { color: soft, size: 8.5 };
  const visits = new Map(snapshot.visits.map((visit) => [visit.ticketId, visit]));
  sheet.say('H2', 'What stands behind it', { size: 12, weight: 600 });
  sheet.space(6);
  function* rows(): Generator<{ cells: Cell[]; ruled?: boolean }> {
    for (const line of snapshot.lines) {
      yield { cells: lineCells(line, column, plain, locale), ruled: true };
      const visit = line.kind === 'ticket' ? visits.get(line.id) : undefined;
      if (visit) yield* visitRows(visit, column, plain, currency);
    }
    const sum = { weight: 600 as const };
    yield {
      ruled: true,
      cells: [
        { ...column.date, text: '' },
        { ...column.reference, text: '' },
        { ...column.words, ...sum, text: 'Charges of the month' },
        { ...column.charged, ...sum, text: plain(sums.charged) },
        { ...column.tax, ...sum, text: plain(sums.tax) },
        { ...column.total, ...sum, text: plain(sums.total) },
      ],
    };
  }
  sheet.table(
    [
      { ...column.date, ...title, text: 'Date' },
      { ...column.reference, ...title, text: 'No.' },
      { ...column.words, ...title, text: 'What' },
      { ...column.charged, ...title, text: `Charged, ${currency}` },
      { ...column.tax, ...title, text: 'Tax' },
      { ...column.total, ...title, text: 'Total' },
    ],
    rows(),
  );
}

type Columns = ReturnType<typeof columns>;

function lineCells(
  line: StatementLine,
  column: Columns,
  plain: (amount: number) => string,
  locale: string,
): Cell[] {
  const charge = line.charged !== 0 || line.tax !== 0 || line.kind === 'ticket';
  return [
    { ...column.date, text: dayName(line.date, locale) },
    { ...column.reference, text: line.reference },
    { ...column.words, text: line.words },
    { ...column.charged, text: charge ? plain(line.charged) : '' },
    { ...column.tax, text: charge ? plain(line.tax) : '' },
    { ...column.total, text: plain(line.total) },
  ];
}

/** What was found and done on each machine, and what the shop bore of it. */
function* visitRows(
  visit: StatedVisit,
  column: Columns,
  plain: (amount: number) => string,
  currency: string,
): Generator<{ cells: Cell[] }> {
  const row = (text: string) => ({
    cells: [
      { ...column.date, text: '' },
      { ...column.reference, text: '' },
      { ...column.inner, text, color: soft, size: 8.5 },
      { ...column.charged, text: '' },
      { ...column.tax, text: '' },
      { ...column.total, text: '' },
    ],
  });
  for (const job of visit.jobs) {
    const story = foundAndDone(job.found || job.reported, job.done);
    yield row(`${job.bay}: ${story || 'looked at'}.`);
    for (const line of job.lines.filter(
      ({ bearer }) => bearer === 'shop' || bearer === 'goodwill',
    )) {
      yield row(`${line.description}: borne by us, ${plain(line.list)} ${currency} not charged.`);
    }
    if (job.testCoins > 0) {
      yield row(
        `Test cycles put ${job.testCoins} coins in the box, ${plain(job.testAmount)} ${currency}.`,
      );
    }
  }
}

/** Amounts of a column whose currency its head names. */
function plainAmounts(currency: string, locale: string): (amount: number) => string {
  const digits = minorDigits(currency);
  const format = new Intl.NumberFormat(locale, {
    minimumFractionDigits: digits,
    maximumFractionDigits: digits,
  });
  return (amount) =>
    format
      .format(decimalFromAmount(amount, currency) as unknown as number)
      .replace('\u202f', '\u00a0');
}
