export { contractName, paymentName, statementName, ticketName } from '@lib/domain';

const formats = new Map<string, Intl.DateTimeFormat>();

/** Making a format costs a thousand times more than using it. */
function format(locale: string, parts: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = `${locale} ${Object.values(parts).join(' ')}`;
  let made = formats.get(key);
  if (!made) {
    made = new Intl.DateTimeFormat(locale, { ...parts, timeZone: 'UTC' });
    formats.set(key, made);
  }
  return made;
}

/** `May 2031`, in the shop's language. */
export function monthName(month: string, locale: string): string {
  const parts = { month: 'long', year: 'numeric' } as const;
  return format(locale, parts).format(new Date(`${month}-15T12:00:00Z`));
}

/** `6 May 2031` or as the shop's language writes it. */
export function dayName(day: string, locale: string): string {
  const parts = { day: 'numeric', month: 'short', year: 'numeric' } as const;
  return format(locale, parts).format(new Date(`${day}T12:00:00Z`));
}
