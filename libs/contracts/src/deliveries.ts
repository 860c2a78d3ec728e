import { z } from 'zod';
import { deliveryState } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id } from './text';
import { instant, version } from './values';

/** One mail of the shop to one person, and how handing it over ended. */
export const delivery = z.object({
  id,
  kind: z.string(),
  state: deliveryState,
  recipient: z.string(),
  recipientName: z.string(),
  subject: z.string(),
  clientId: id.nullable(),
  statementId: id.nullable(),
  attempt: z.int(),
  lastError: z.string().nullable(),
  nextAttemptAt: instant,
  sentAt: instant.nullable(),
  createdAt: instant,
  version,
});

export const deliveryOperations = defineOperations({
  'deliveries.list': {
    method: 'GET',
    path: '/api/deliveries',
    summary: 'Mails of the shop, newest first',
    permission: 'deliveries.read',
    query: listQuery({
      sort: ['-createdAt'],
      filters: {
        state: deliveryState.optional(),
        statementId: id.optional(),
        runId: id.optional(),
        clientId: id.optional(),
      },
    }),
    answer: listOf(delivery),
  },
  'deliveries.decide': {
    method: 'POST',
    path: '/api/deliveries/:deliveryId/decide',
    summary: 'Settle a mail whose answer was lost, or send a failed one again',
    permission: 'deliveries.decide',
    params: z.strictObject({ deliveryId: id }),
    ifMatch: true,
    /** `arrived`: somebody has it. `send_again`: they have not, or the address was put right. */
    body: z.strictObject({ decision: z.enum(['arrived', 'send_again']) }),
    answer: delivery,
    status: 200,
    problems: ['conflict'],
  },
});
