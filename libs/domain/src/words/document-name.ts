/** What people call a document: its kind's letter and its number, `S-0142`. */
function named(letter: string, number: number): string {
  return `${letter}-${String(number).padStart(4, '0')}`;
}

export const statementName = (number: number): string => named('S', number);
export const ticketName = (number: number): string => named('T', number);
export const paymentName = (number: number): string => named('P', number);
/** A maintenance contract. */
export const contractName = (number: number): string => named('M', number);
