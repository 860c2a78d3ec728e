import { z } from 'zod';
import { conditionKind } from './enums';
import { defineOperations } from './operation';
import { id, line, words } from './text';
import { instant, minutes, version } from './values';

const conditionFields = {
  kind: conditionKind,
  words: words(500).min(1),
  /** Minutes it adds to work there. */
  extraMinutes: minutes.max(480),
  /** What to bring because of it. */
  tool: line(120, 0),
};

export const condition = z.object({
  id,
  storeId: id,
  /** Null: of the store as a whole. */
  machine: z.object({ id, bay: z.string() }).nullable(),
  kind: conditionKind,
  words: z.string(),
  extraMinutes: z.int(),
  tool: z.string(),
  clearedAt: instant.nullable(),
  createdAt: instant,
  version,
});

const params = z.strictObject({ conditionId: id });

export const conditionOperations = defineOperations({
  'conditions.list': {
    method: 'GET',
    path: '/api/stores/:storeId/conditions',
    summary: 'Conditions of a store and its machines, newest first',
    permission: 'machines.read',
    params: z.strictObject({ storeId: id }),
    query: z.strictObject({ show: z.enum(['open', 'cleared', 'all']).default('open') }),
    answer: z.object({ items: z.array(condition) }),
  },
  'conditions.create': {
    method: 'POST',
    path: '/api/conditions',
    summary: 'Note what changes how work is done at a store or a machine',
    permission: 'machines.change',
    body: z.strictObject({
      storeId: id,
      machineId: id.nullish(),
      kind: conditionFields.kind,
      words: conditionFields.words,
      extraMinutes: conditionFields.extraMinutes.default(0),
      tool: conditionFields.tool.default(''),
    }),
    answer: condition,
  },
  'conditions.change': {
    method: 'PATCH',
    path: '/api/conditions/:conditionId',
    summary: 'Change a condition',
    permission: 'machines.change',
    params,
    ifMatch: true,
    body: z.strictObject(conditionFields).partial(),
    answer: condition,
  },
  'conditions.clear': {
    method: 'POST',
    path: '/api/conditions/:conditionId/clear',
    summary: 'Note that a condition is no more',
    permission: 'machines.change',
    params,
    ifMatch: true,
    answer: condition,
    status: 200,
  },
});
