import { counted } from '@lib/ui';
import { type Preview } from './month-close-api';

/**
 * What closing the month does, in figures: asked before it is done, because statements, once
 * numbered and mailed, stay.
 */
export function consequenceWords(preview: Preview, money: (amount: number) => string): string {
  const { stores, totals, unfinished } = preview;
  const mails = stores.reduce((sum, store) => sum + store.recipients, 0);
  const left = [
    unfinished.visits.count
      ? `${counted(unfinished.visits.count, 'visit')} not signed off will stand on a later one`
      : '',
    unfinished.withoutRecipient.count
      ? `for ${counted(unfinished.withoutRecipient.count, 'store')} nobody gets it by mail`
      : '',
  ].filter(Boolean);
  return [
    `${counted(totals.stores, 'statement')} over ${money(totals.charged + totals.tax)} of new ` +
      `charges are numbered, posted and mailed, ${counted(mails, 'mail')} in all.`,
    left.length ? `${sentence(left.join('; '))}.` : '',
    'A statement that was made cannot be taken back.',
  ]
    .filter(Boolean)
    .join(' ');
}

function sentence(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
