import { formatMoney, printedRfReference } from '@lib/domain';
import { type Letter, layOut } from '../../core/mail/mail-layout';
import { dayName, monthName } from '../statements/document-names';
import { type StoredSnapshot } from '../statements/stored-snapshot';

export interface StatementLetter {
  shop: { name: string; phone: string; locale: string; currency: string };
  recipientName: string;
  subject: string;
  snapshot: StoredSnapshot;
  url: string;
}

/** The mail that carries a statement: what it comes to in text, all of it in the PDF beside. */
export function statementLetter(about: StatementLetter): { text: string; html: string } {
  const { shop, snapshot } = about;
  const money = (amount: number) => formatMoney(amount, snapshot.currency, shop.locale);
  const { sums, closing, opening } = snapshot;
  const due = dayName(snapshot.dueOn, shop.locale);
  const facts: [string, string][] = [
    ['Balance before', money(opening)],
    ['Paid', money(sums.paid + sums.credited)],
    ['Charged with tax', money(sums.total)],
    ['Balance now', money(closing)],
  ];
  if (sums.borneByShop > 0) facts.push(['Borne by us, not charged', money(sums.borneByShop)]);
  facts.push(['Payment reference', printedRfReference(snapshot.reference)]);
  const visits = snapshot.visits.map((visit) => [
    dayName(visit.date, shop.locale),
    visit.words,
    money(visit.charged + visit.tax),
  ]);
  const letter: Letter = {
    title: about.subject,
    locale: shop.locale,
    greeting: about.recipientName ? `Hello ${about.recipientName},` : 'Hello,',
    pieces: [
      {
        words:
          closing > 0
            ? `the statement of ${snapshot.store.name} for ${monthName(snapshot.period, shop.locale)} comes to ${money(closing)}, due by ${due}. All of it is in the PDF attached.`
            : `here is the statement of ${snapshot.store.name} for ${monthName(snapshot.period, shop.locale)}. There is nothing to pay.`,
      },
      { facts },
      ...(visits.length
        ? [
            {
              table: {
                caption: 'Visits',
                columns: [{ name: 'Date' }, { name: 'What' }, { name: 'Charged', right: true }],
                rows: visits,
              },
            },
          ]
        : []),
      { link: { label: closing > 0 ? 'See it and pay' : 'See it', url: about.url } },
    ],
    sender: [shop.name, ...(shop.phone ? [shop.phone] : [])],
    why: `You get this mail because ${shop.name} has you as a statement contact of ${snapshot.store.name}.`,
  };
  return layOut(letter);
}
