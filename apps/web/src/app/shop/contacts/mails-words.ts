import { type Contact } from './contacts-api';

/** Which mails a contact gets, in words. */
export function mailsWords(contact: Contact): string {
  if (contact.endedAt) return 'nothing any more';
  if (contact.getsStatements && contact.getsVisits) return 'statements and visits';
  if (contact.getsStatements) return 'statements';
  return contact.getsVisits ? 'visits' : 'nothing';
}
