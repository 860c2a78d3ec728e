import { handle } from '../../core/http/route';
import { changeContact, createContact, endContact, listContacts, resumeContact } from './contacts';

export const contactsRoutes = [
  handle('contacts.list', (context, { query }) => listContacts(context, query)),
  handle('contacts.create', (context, { body }) => createContact(context, body)),
  handle('contacts.change', (context, { params, version, body }) =>
    changeContact(context, params.contactId, version, body),
  ),
  handle('contacts.end', (context, { params, version }) =>
    endContact(context, params.contactId, version),
  ),
  handle('contacts.resume', (context, { params, version }) =>
    resumeContact(context, params.contactId, version),
  ),
];
