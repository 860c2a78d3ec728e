import { type AnswerOf } from '../../core/http/route';

type Attachment = AnswerOf<'files.add'>;

export interface AttachmentRow extends Omit<Attachment, 'addedAt'> {
  addedAt: Date;
}

export const attachmentColumns = `id, owner_kind as "ownerKind", owner_id as "ownerId", name,
  content_type as "contentType", bytes, created_at as "addedAt"`;

export function presentAttachment(row: AttachmentRow): Attachment {
  return { ...row, addedAt: row.addedAt.toISOString() };
}
