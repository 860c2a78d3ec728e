import { z } from 'zod';
import { defineOperations } from './operation';
import { id } from './text';
import { instant } from './values';

/** What a photo can be added to. */
export const fileOwner = z.enum(['job', 'call', 'store']);

export const attachment = z.object({
  id,
  ownerKind: fileOwner,
  ownerId: id,
  name: z.string(),
  contentType: z.string(),
  bytes: z.int(),
  addedAt: instant,
});

export const fileOperations = defineOperations({
  'files.add': {
    method: 'POST',
    path: '/api/files',
    summary: 'Add a photo (JPEG, PNG or WebP) to a job, a call or a store',
    permission: 'files.add',
    // The caller may choose the id, so that a repeat after a lost answer is the same photo.
    idempotency: 'natural',
    bodyType: 'multipart/form-data',
    body: z.strictObject({ id: id.optional(), ownerKind: fileOwner, ownerId: id }),
    answer: attachment,
    problems: ['not-found', 'conflict'],
  },
  'files.list': {
    method: 'GET',
    path: '/api/files',
    summary: 'The photos of a job, a call or a store, oldest first',
    permission: 'files.read',
    query: z.strictObject({ ownerKind: fileOwner, ownerId: id }),
    answer: z.object({ items: z.array(attachment) }),
    problems: ['not-found'],
  },
  'files.show': {
    method: 'GET',
    path: '/api/files/:fileId',
    summary: 'The photo itself, or a small one to list',
    permission: 'files.read',
    params: z.strictObject({ fileId: id }),
    query: z.strictObject({ size: z.enum(['full', 'small']).default('full') }),
    answerType: 'image/*',
  },
});
