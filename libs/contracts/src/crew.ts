import { z } from 'zod';
import { showFilter } from './clients';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, line } from './text';
import { amount, instant, version } from './values';

export const crewRole = z.enum(['shop_owner', 'office', 'tech']);

/** A person of the shop, by their membership. */
export const crewMember = z.object({
  id,
  name: z.string(),
  email: z.string(),
  role: crewRole,
  initials: z.string(),
  van: z.string(),
  /** What an hour costs the shop; null for those who may not manage the crew. */
  costPerHour: z.int().nullable(),
  since: instant,
  endedAt: instant.nullable(),
  /** Whether this is the person who asks. */
  you: z.boolean(),
  version,
});

/** A person of a client laundry who signs in here. */
export const clientPerson = z.object({
  id,
  name: z.string(),
  email: z.string(),
  role: z.enum(['client_owner', 'attendant']),
  clientId: id,
  clientName: z.string(),
  storeId: id.nullable(),
  storeName: z.string().nullable(),
  since: instant,
  endedAt: instant.nullable(),
  version,
});

const params = z.strictObject({ membershipId: id });

export const crewOperations = defineOperations({
  'crew.list': {
    method: 'GET',
    path: '/api/crew',
    summary: "The shop's people by name",
    permission: 'crew.read',
    query: listQuery({ sort: ['name'], filters: { role: crewRole.optional(), show: showFilter } }),
    answer: listOf(crewMember),
  },
  'crew.show': {
    method: 'GET',
    path: '/api/crew/:membershipId',
    summary: 'One person of the shop',
    permission: 'crew.read',
    params,
    answer: crewMember,
  },
  'crew.change': {
    method: 'PATCH',
    path: '/api/crew/:membershipId',
    summary: "Change a person's role, initials, van or cost",
    permission: 'crew.manage',
    params,
    ifMatch: true,
    body: z
      .strictObject({ role: crewRole, initials: line(4), van: line(40, 0), costPerHour: amount })
      .partial(),
    answer: crewMember,
    problems: ['conflict'],
  },
  'crew.end': {
    method: 'POST',
    path: '/api/crew/:membershipId/end',
    summary: 'End a person’s membership; what they recorded stays',
    permission: 'crew.manage',
    params,
    ifMatch: true,
    answer: crewMember,
    status: 200,
    problems: ['conflict'],
  },
  'clientPeople.list': {
    method: 'GET',
    path: '/api/client-people',
    summary: 'People of client laundries who sign in here, by name',
    permission: 'invitations.manage',
    query: listQuery({
      sort: ['name'],
      filters: { clientId: id.optional(), storeId: id.optional(), show: showFilter },
    }),
    answer: listOf(clientPerson),
  },
  'clientPeople.end': {
    method: 'POST',
    path: '/api/client-people/:membershipId/end',
    summary: 'End what a person of a client laundry may see here',
    permission: 'invitations.manage',
    params,
    ifMatch: true,
    answer: clientPerson,
    status: 200,
    problems: ['conflict'],
  },
});
