/** What people call a document: its kind's letter and its number, `S-0142`. */
function named(letter: string, number: number): string {
  return `${letter}-${String(number).padStart(4, '0')}`;
}

export const statementName = (number: number): string => named('S', number);
export const ticketName = (number: number): string => named('T', number);
export const paymentName = (number: number): string => named('P', number);
export const contractName = (number: number): string => named('M', number);

/** `May 2031`, in the shop's language. */
export function monthName(month: string, locale: string): string {
  return new Intl.DateTimeFormat(locale, {
    month: 'long',
    year: 'numeric',
    timeZone: 'UTC',
  }).format(new Date(`${month}-15T12:00:00Z`));
}

/** `6 May 2031` or as the shop's language writes it. */
export function dayName(day: string, locale: string): string {
  return new Intl.DateTimeFormat(locale, {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    timeZone: 'UTC',
  }).format(new Date(`${day}T12:00:00Z`));
}
