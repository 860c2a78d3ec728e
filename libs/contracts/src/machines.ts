import { z } from 'zod';
import { condition } from './conditions';
import { cause, energy, jobResult, machineKind, machineState } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, line, words } from './text';
import { amount, day, instant, version } from './values';

/** A, B ... or two letters where a store has more banks than that. */
const letter = z
  .string()
  .trim()
  .toUpperCase()
  .regex(/^[A-Z]{1,2}$/, { error: 'is one or two letters' });
const bayNumber = z.int().min(1).max(999);

const machineFields = {
  kind: machineKind,
  energy,
  make: line(60, 0),
  model: line(60, 0),
  serial: line(60, 0),
  builtOn: day.nullable(),
  installedOn: day.nullable(),
  volts: z.int().min(1).max(1000).nullable(),
  amps: z.number().min(0).max(1000).multipleOf(0.01).nullable(),
  /** Price of one cycle; minor units. */
  vendPrice: amount,
  cyclesADay: z.number().min(0).max(1000).multipleOf(0.1),
  supplierWarrantyUntil: day.nullable(),
  /** The shop's own; people of the client do not see it. */
  note: words(2000),
};

/** A state somebody sets by hand; a machine is retired by `machines.retire`. */
const settableState = machineState.exclude(['retired']);

export const bank = z.object({
  id,
  storeId: id,
  letter: z.string(),
  words: z.string(),
  version,
});

export const machineSummary = z.object({
  id,
  store: z.object({ id, name: z.string() }),
  /** As people say it: `B-07`, bank B, seventh. */
  bay: z.string(),
  kind: machineKind,
  energy,
  make: z.string(),
  model: z.string(),
  serial: z.string(),
  state: machineState,
  stateSince: instant,
  /** What it takes on a usual day, in minor units; null for attendants, who see no money. */
  takingsADay: z.int().nullable(),
  version,
});

/** What was done to a machine on one visit. */
export const machineJob = z.object({
  jobId: id,
  visitId: id,
  visitNumber: z.int(),
  position: z.int(),
  on: day,
  finding: z.string(),
  cause: cause.nullable(),
  action: z.string(),
  result: jobResult.nullable(),
  /** Null until the visit is signed off. */
  ticketNumber: z.int().nullable(),
});

export const machine = machineSummary.extend({
  client: z.object({ id, name: z.string() }),
  bank: z.object({ id, letter: z.string() }),
  bayNumber: z.int(),
  builtOn: day.nullable(),
  installedOn: day.nullable(),
  volts: z.int().nullable(),
  amps: z.number().nullable(),
  vendPrice: z.int(),
  cyclesADay: z.number(),
  supplierWarrantyUntil: day.nullable(),
  /** Printed on the machine's sticker; in letters and digits that cannot be mistaken. */
  stickerCode: z.string(),
  /** Null for people of the client. */
  note: z.string().nullable(),
  conditions: z.array(condition),
  /** The last 20, newest first. */
  jobs: z.array(machineJob),
});

const params = z.strictObject({ machineId: id });

export const bankOperations = defineOperations({
  'banks.create': {
    method: 'POST',
    path: '/api/stores/:storeId/banks',
    summary: 'Add a bank to a store',
    permission: 'machines.change',
    params: z.strictObject({ storeId: id }),
    body: z.strictObject({ letter, words: words(120).default('') }),
    answer: bank,
    problems: ['conflict'],
  },
  'banks.change': {
    method: 'PATCH',
    path: '/api/banks/:bankId',
    summary: 'Change a bank; with its letter the bays of its machines change',
    permission: 'machines.change',
    params: z.strictObject({ bankId: id }),
    ifMatch: true,
    body: z.strictObject({ letter, words: words(120) }).partial(),
    answer: bank,
    problems: ['conflict'],
  },
});

export const machineOperations = defineOperations({
  'machines.list': {
    method: 'GET',
    path: '/api/machines',
    summary: 'Machines by bay, by serial number, or by what changed its state last',
    permission: 'machines.read',
    query: listQuery({
      sort: ['bay', 'serial', '-stateSince'],
      filters: {
        clientId: id.optional(),
        storeId: id.optional(),
        kind: machineKind.optional(),
        /** `not_up`: degraded, down or locked out. Without it, all but retired ones. */
        state: z.enum([...machineState.options, 'not_up']).optional(),
      },
    }),
    answer: listOf(machineSummary),
  },
  'machines.show': {
    method: 'GET',
    path: '/api/machines/:machineId',
    summary: 'One machine, with its conditions and last jobs',
    permission: 'machines.read',
    params,
    answer: machine,
  },
  'machines.create': {
    method: 'POST',
    path: '/api/machines',
    summary: 'Add a machine to a bank',
    permission: 'machines.change',
    body: z.strictObject({
      ...z.strictObject(machineFields).partial().shape,
      bankId: id,
      /** Given, or the next after the last of the bank. */
      bayNumber: bayNumber.optional(),
      kind: machineFields.kind,
      state: settableState.default('up'),
    }),
    answer: machine,
    problems: ['conflict', 'plan-limit'],
  },
  'machines.change': {
    method: 'PATCH',
    path: '/api/machines/:machineId',
    summary: 'Change some of what is known of a machine',
    permission: 'machines.change',
    params,
    ifMatch: true,
    body: z.strictObject(machineFields).partial(),
    answer: machine,
    problems: ['conflict'],
  },
  'machines.setState': {
    method: 'POST',
    path: '/api/machines/:machineId/state',
    summary: 'Set the state of a machine outside a visit, and say why',
    permission: 'machines.change',
    params,
    ifMatch: true,
    body: z.strictObject({ state: settableState, words: words(500).default('') }),
    answer: machine,
    status: 200,
    problems: ['conflict'],
  },
  'machines.retire': {
    method: 'POST',
    path: '/api/machines/:machineId/retire',
    summary: 'Take a machine out for good; its history stays and its bay becomes free',
    permission: 'machines.change',
    params,
    ifMatch: true,
    body: z.strictObject({ words: words(500).default('') }),
    answer: machine,
    status: 200,
    problems: ['conflict'],
  },
  'machines.move': {
    method: 'POST',
    path: '/api/machines/:machineId/move',
    summary: 'Move a machine to another bay, of this store or another one of the client',
    permission: 'machines.change',
    params,
    ifMatch: true,
    body: z.strictObject({ bankId: id, bayNumber }),
    answer: machine,
    status: 200,
    problems: ['conflict'],
  },
});
