import { z } from 'zod';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id } from './text';
import { instant, version } from './values';

/**
 * What a list can be of: stores with their client and statement contact, machines with their bank,
 * or parts.
 */
export const importKind = z.enum(['stores', 'machines', 'parts']);
export const importState = z.enum([
  'waiting',
  'checking',
  'checked',
  'applying',
  'applied',
  'failed',
  'discarded',
]);
export const rowOutcome = z.enum(['new', 'changed', 'unchanged', 'bad']);

export const importSummary = z.object({
  id,
  kind: importKind,
  fileName: z.string(),
  state: importState,
  rowsTotal: z.int(),
  /** How far the check or the applying has come. */
  rowsDone: z.int(),
  counts: z.object({ new: z.int(), changed: z.int(), unchanged: z.int(), bad: z.int() }),
  /** Why it failed, in words for the person who sent the file. */
  problem: z.string().nullable(),
  createdAt: instant,
  version,
});

export const importRow = z.object({
  /** As a spreadsheet counts: the header is row 1. */
  row: z.int(),
  outcome: rowOutcome,
  /** What the row is about, in short: its number and name. */
  label: z.string(),
  /** For a bad row: what is wrong, column by column. */
  errors: z.array(z.object({ column: z.string(), detail: z.string() })),
  /** For a changed row: what it would change. */
  changes: z.array(z.object({ column: z.string(), from: z.string(), to: z.string() })),
});

const params = z.strictObject({ importId: id });

export const importOperations = defineOperations({
  'imports.start': {
    method: 'POST',
    path: '/api/imports',
    summary: 'Send a CSV file; it is checked first and changes nothing until it is applied',
    permission: 'imports.run',
    // The caller may choose the id, so that a repeat after a lost answer is the same import.
    idempotency: 'natural',
    bodyType: 'multipart/form-data',
    body: z.strictObject({ id: id.optional(), kind: importKind }),
    answer: importSummary,
    status: 202,
    problems: ['conflict'],
  },
  'imports.list': {
    method: 'GET',
    path: '/api/imports',
    summary: 'Imports, the newest first',
    permission: 'imports.run',
    query: listQuery({ sort: ['-createdAt'] }),
    answer: listOf(importSummary),
  },
  'imports.show': {
    method: 'GET',
    path: '/api/imports/:importId',
    summary: 'How far an import is, and what it found',
    permission: 'imports.run',
    params,
    answer: importSummary,
  },
  'imports.rows': {
    method: 'GET',
    path: '/api/imports/:importId/rows',
    summary: 'The checked rows, in the order of the file',
    permission: 'imports.run',
    params,
    query: listQuery({ sort: ['row'], filters: { outcome: rowOutcome.optional() } }).omit({
      q: true,
    }),
    answer: listOf(importRow),
  },
  'imports.apply': {
    method: 'POST',
    path: '/api/imports/:importId/apply',
    summary: 'Apply every row of a checked file, or none; refused while a row is bad',
    permission: 'imports.run',
    params,
    ifMatch: true,
    answer: importSummary,
    status: 202,
    problems: ['conflict', 'plan-limit'],
  },
  'imports.discard': {
    method: 'POST',
    path: '/api/imports/:importId/discard',
    summary: 'Put an import away without applying it',
    permission: 'imports.run',
    params,
    ifMatch: true,
    answer: importSummary,
    status: 200,
    problems: ['conflict'],
  },
  'imports.template': {
    method: 'GET',
    path: '/api/import-templates/:kind',
    summary: 'An empty file with the columns of a kind and one example row',
    permission: 'imports.run',
    params: z.strictObject({ kind: importKind }),
    answerType: 'text/csv',
  },
});
