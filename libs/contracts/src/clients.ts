import { z } from 'zod';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, line, words } from './text';
import { amount, basisPoints, instant, version } from './values';

/** What a list shows of things that can end: those that stand (default), those that ended, or both. */
export const showFilter = z.enum(['current', 'ended', 'all']).default('current');

/** What one client has agreed on; what is absent or null stands as in the price book. */
export const clientOverrides = z.strictObject({
  normalPerHour: amount.nullish(),
  afterHoursPerHour: amount.nullish(),
  /** Instead of every markup band. */
  markupBasisPoints: basisPoints.nullish(),
  /** Instead of every trip rule. */
  tripAmount: amount.nullish(),
  /** Off every line. */
  discountBasisPoints: basisPoints.max(10_000).nullish(),
});

const clientFields = {
  name: line(120),
  /** Days after its date that a statement falls due; null: as the shop has it. */
  termsDays: z.int().min(0).max(120).nullable(),
  taxExempt: z.boolean(),
  /** The certificate that says so. */
  taxExemptReference: line(80, 0),
  overrides: clientOverrides,
  /** The shop's own; people of the client do not see it. */
  note: words(2000),
};
const number = line(20);

export const clientSummary = z.object({
  id,
  number: z.string(),
  name: z.string(),
  stores: z.int(),
  machines: z.int(),
  /** Machines that are degraded, down or locked out. */
  machinesNotUp: z.int(),
  endedAt: instant.nullable(),
  version,
});

export const client = clientSummary.extend({
  termsDays: z.int().nullable(),
  taxExempt: z.boolean(),
  taxExemptReference: z.string(),
  /** Null for people of the client. */
  overrides: clientOverrides.nullable(),
  /** Null for people of the client. */
  note: z.string().nullable(),
});

const params = z.strictObject({ clientId: id });

export const clientOperations = defineOperations({
  'clients.list': {
    method: 'GET',
    path: '/api/clients',
    summary: 'Clients by name or number',
    permission: 'clients.read',
    query: listQuery({ sort: ['name', 'number'], filters: { show: showFilter } }),
    answer: listOf(clientSummary),
  },
  'clients.show': {
    method: 'GET',
    path: '/api/clients/:clientId',
    summary: 'One client',
    permission: 'clients.read',
    params,
    answer: client,
  },
  'clients.create': {
    method: 'POST',
    path: '/api/clients',
    summary: 'Add a client',
    permission: 'clients.change',
    body: z.strictObject({
      ...z.strictObject(clientFields).partial().shape,
      name: clientFields.name,
      /** Given by the shop, or the next free one. */
      number: number.optional(),
    }),
    answer: client,
    problems: ['conflict'],
  },
  'clients.change': {
    method: 'PATCH',
    path: '/api/clients/:clientId',
    summary: 'Change some of what is known of a client',
    permission: 'clients.change',
    params,
    ifMatch: true,
    body: z.strictObject({ ...clientFields, number }).partial(),
    answer: client,
    problems: ['conflict'],
  },
  'clients.end': {
    method: 'POST',
    path: '/api/clients/:clientId/end',
    summary: 'Stop working for a client; nothing is lost, and its stores end with it',
    permission: 'clients.change',
    params,
    ifMatch: true,
    answer: client,
    status: 200,
    problems: ['conflict'],
  },
  'clients.resume': {
    method: 'POST',
    path: '/api/clients/:clientId/resume',
    summary: 'Work for an ended client again; its stores are resumed one by one',
    permission: 'clients.change',
    params,
    ifMatch: true,
    answer: client,
    status: 200,
    problems: ['conflict'],
  },
});
