import { z } from 'zod';
import { showFilter } from './clients';
import { energy, machineKind, machineState } from './enums';
import { listOf, listQuery } from './lists';
import { condition } from './conditions';
import { defineOperations } from './operation';
import { id, line, words } from './text';
import { amount, instant, version, zone } from './values';

const storeFields = {
  name: line(120),
  address: words(300),
  /** Null: the shop's own time zone. */
  zone: zone.nullable(),
  hours: words(200),
  /** How to get in: key, alarm, whom to ring. */
  accessWords: words(1000),
  /** Where it lies for taxes, as a path: `MN/Hennepin`. */
  taxPlace: line(80, 0),
  /** The shop's own name for a part of its area, which a trip rule can name. */
  tripPlace: line(80, 0),
  /** How far it is, in metres; null: not known. */
  tripMetres: z.int().min(0).max(2_000_000).nullable(),
  /** What a test card of this store is loaded with; minor units. */
  cardValue: amount,
};
const number = line(20);

export const machineCounts = z.object({
  up: z.int(),
  degraded: z.int(),
  down: z.int(),
  lockedOut: z.int(),
});

export const storeSummary = z.object({
  id,
  number: z.string(),
  name: z.string(),
  address: z.string(),
  client: z.object({ id, name: z.string() }),
  machines: machineCounts,
  endedAt: instant.nullable(),
  version,
});

export const store = storeSummary.extend({
  zone: z.string().nullable(),
  hours: z.string(),
  accessWords: z.string(),
  taxPlace: z.string(),
  tripPlace: z.string(),
  tripMetres: z.int().nullable(),
  cardValue: z.int(),
  /** Those that are not cleared, of the store and of its machines. */
  conditions: z.array(condition),
  /** What the next tech must do, oldest first. */
  openItems: z.array(
    z.object({
      id,
      machine: z.object({ id, bay: z.string() }).nullable(),
      words: z.string(),
      createdAt: instant,
    }),
  ),
  openCalls: z.int(),
});

export const floorMachine = z.object({
  id,
  bay: z.string(),
  bayNumber: z.int(),
  kind: machineKind,
  energy,
  make: z.string(),
  model: z.string(),
  state: machineState,
  stateSince: instant,
  /** Facts not cleared that change how work is done there. */
  conditions: z.int(),
  /** Calls that are open or planned. */
  openCalls: z.int(),
  version,
});

/** A store as it stands: its banks in the order of their letters, machines in the order of bays. */
export const floor = z.object({
  store: z.object({
    id,
    number: z.string(),
    name: z.string(),
    client: z.object({ id, name: z.string() }),
  }),
  banks: z.array(
    z.object({
      id,
      letter: z.string(),
      words: z.string(),
      version,
      machines: z.array(floorMachine),
    }),
  ),
});

const params = z.strictObject({ storeId: id });

export const storeOperations = defineOperations({
  'stores.list': {
    method: 'GET',
    path: '/api/stores',
    summary: 'Stores by name or number',
    permission: 'clients.read',
    query: listQuery({
      sort: ['name', 'number'],
      filters: { clientId: id.optional(), show: showFilter },
    }),
    answer: listOf(storeSummary),
  },
  'stores.show': {
    method: 'GET',
    path: '/api/stores/:storeId',
    summary: 'One store, with its conditions and open items',
    permission: 'clients.read',
    params,
    answer: store,
  },
  'stores.floor': {
    method: 'GET',
    path: '/api/stores/:storeId/floor',
    summary: 'The floor of a store: banks and machines in their bays',
    permission: 'machines.read',
    params,
    answer: floor,
  },
  'stores.create': {
    method: 'POST',
    path: '/api/stores',
    summary: 'Add a store to a client',
    permission: 'clients.change',
    body: z.strictObject({
      ...z.strictObject(storeFields).partial().shape,
      clientId: id,
      name: storeFields.name,
      /** Given by the shop, or the next free one. */
      number: number.optional(),
    }),
    answer: store,
    problems: ['conflict', 'plan-limit'],
  },
  'stores.change': {
    method: 'PATCH',
    path: '/api/stores/:storeId',
    summary: 'Change some of what is known of a store',
    permission: 'clients.change',
    params,
    ifMatch: true,
    body: z.strictObject({ ...storeFields, number }).partial(),
    answer: store,
    problems: ['conflict'],
  },
  'stores.end': {
    method: 'POST',
    path: '/api/stores/:storeId/end',
    summary: 'Stop working for a store; nothing is lost',
    permission: 'clients.change',
    params,
    ifMatch: true,
    answer: store,
    status: 200,
    problems: ['conflict'],
  },
  'stores.resume': {
    method: 'POST',
    path: '/api/stores/:storeId/resume',
    summary: 'Work for an ended store again',
    permission: 'clients.change',
    params,
    ifMatch: true,
    answer: store,
    status: 200,
    problems: ['conflict', 'plan-limit'],
  },
});
