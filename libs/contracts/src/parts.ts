import { z } from 'zod';
import { showFilter } from './clients';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, line } from './text';
import { amount, instant, version } from './values';

const category = line(40).toLowerCase();
const partFields = {
  number: line(60),
  name: line(160),
  /** What it is a part of, in the shop's words: `door`, `pump`. Warranty rules go by it. */
  category,
  /** What one costs the shop; minor units. */
  unitCost: amount,
  /** The price of one, whatever it costs; null: cost plus markup. */
  fixedPrice: amount.nullable(),
  /** The maker's own, or an equivalent. */
  makersPart: z.boolean(),
  scarce: z.boolean(),
  supplier: line(80, 0),
  /** The part that took its place. */
  supersededBy: id.nullable(),
};

export const part = z.object({
  id,
  number: z.string(),
  name: z.string(),
  category: z.string(),
  unitCost: z.int(),
  fixedPrice: z.int().nullable(),
  makersPart: z.boolean(),
  scarce: z.boolean(),
  supplier: z.string(),
  /** The part to use instead: superseded numbers are followed to the last. */
  successor: z.object({ id, number: z.string(), name: z.string() }).nullable(),
  supersededBy: id.nullable(),
  endedAt: instant.nullable(),
  version,
});

const params = z.strictObject({ partId: id });

export const partOperations = defineOperations({
  'parts.list': {
    method: 'GET',
    path: '/api/parts',
    summary: 'Parts by number or name',
    permission: 'prices.read',
    query: listQuery({
      sort: ['number', 'name'],
      filters: { category: category.optional(), show: showFilter },
    }),
    answer: listOf(part),
  },
  'parts.categories': {
    method: 'GET',
    path: '/api/part-categories',
    summary: 'The categories in use',
    permission: 'prices.read',
    answer: z.object({ items: z.array(z.string()) }),
  },
  'parts.show': {
    method: 'GET',
    path: '/api/parts/:partId',
    summary: 'One part',
    permission: 'prices.read',
    params,
    answer: part,
  },
  'parts.create': {
    method: 'POST',
    path: '/api/parts',
    summary: 'Add a part',
    permission: 'parts.change',
    body: z.strictObject({
      ...z.strictObject(partFields).partial().shape,
      number: partFields.number,
      name: partFields.name,
      category: partFields.category,
      unitCost: partFields.unitCost,
    }),
    answer: part,
    problems: ['conflict'],
  },
  'parts.change': {
    method: 'PATCH',
    path: '/api/parts/:partId',
    summary: 'Change some of what is known of a part; what was fitted keeps its price',
    permission: 'parts.change',
    params,
    ifMatch: true,
    body: z.strictObject(partFields).partial(),
    answer: part,
    problems: ['conflict'],
  },
  'parts.end': {
    method: 'POST',
    path: '/api/parts/:partId/end',
    summary: 'Offer a part no more',
    permission: 'parts.change',
    params,
    ifMatch: true,
    answer: part,
    status: 200,
  },
  'parts.resume': {
    method: 'POST',
    path: '/api/parts/:partId/resume',
    summary: 'Offer an ended part again',
    permission: 'parts.change',
    params,
    ifMatch: true,
    answer: part,
    status: 200,
  },
});
