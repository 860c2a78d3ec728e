import { z } from 'zod';
import { showFilter } from './clients';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { email, id, line, phone } from './text';
import { instant, version } from './values';

const contactFields = {
  name: line(120),
  email: email.nullable(),
  phone: phone.nullable(),
  /** Gets the statements of the store, or of every store of the client. Needs an e-mail address. */
  getsStatements: z.boolean(),
  /** Gets word of each visit. Needs an e-mail address. */
  getsVisits: z.boolean(),
};

export const contact = z.object({
  id,
  client: z.object({ id, name: z.string() }),
  /** Null: for every store of the client. */
  store: z.object({ id, name: z.string() }).nullable(),
  name: z.string(),
  email: z.string().nullable(),
  phone: z.string().nullable(),
  getsStatements: z.boolean(),
  getsVisits: z.boolean(),
  endedAt: instant.nullable(),
  version,
});

const params = z.strictObject({ contactId: id });

export const contactOperations = defineOperations({
  'contacts.list': {
    method: 'GET',
    path: '/api/contacts',
    summary: 'People at clients and stores',
    permission: 'contacts.read',
    query: listQuery({
      sort: ['name'],
      filters: {
        clientId: id.optional(),
        /** Those of the store itself and those for every store of its client. */
        storeId: id.optional(),
        show: showFilter,
      },
    }),
    answer: listOf(contact),
    problems: ['not-found'],
  },
  'contacts.create': {
    method: 'POST',
    path: '/api/contacts',
    summary: 'Add a person at a client or a store',
    permission: 'clients.change',
    body: z.strictObject({
      ...z.strictObject(contactFields).partial().shape,
      clientId: id,
      storeId: id.nullish(),
      name: contactFields.name,
    }),
    answer: contact,
  },
  'contacts.change': {
    method: 'PATCH',
    path: '/api/contacts/:contactId',
    summary: 'Change some of what is known of a contact',
    permission: 'clients.change',
    params,
    ifMatch: true,
    body: z.strictObject(contactFields).partial(),
    answer: contact,
  },
  'contacts.end': {
    method: 'POST',
    path: '/api/contacts/:contactId/end',
    summary: 'Send nothing to this contact any more',
    permission: 'clients.change',
    params,
    ifMatch: true,
    answer: contact,
    status: 200,
  },
  'contacts.resume': {
    method: 'POST',
    path: '/api/contacts/:contactId/resume',
    summary: 'Write to an ended contact again',
    permission: 'clients.change',
    params,
    ifMatch: true,
    answer: contact,
    status: 200,
  },
});
