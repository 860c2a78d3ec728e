import { type Context } from '../../core/context';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { files } from '../../core/files/file-store';
import { type AnswerOf, type InputOf, RawReply } from '../../core/http/route';
import { found, notFound } from '../../core/problems/problem';
import { type AttachmentRow, attachmentColumns, presentAttachment } from './attachment-row';
import { clientOfOwner, type OwnerKind } from './owner';

export function listPhotos(
  context: Context,
  query: InputOf<'files.list'>['query'],
): Promise<AnswerOf<'files.list'>> {
  return withTenant(context, async () => {
    await clientOfOwner(context, query.ownerKind, query.ownerId);
    const found = await rows<AttachmentRow>(
      `select ${attachmentColumns} from attachments where shop_id = $shopId
         and owner_kind = $ownerKind and owner_id = $ownerId order by created_at, id`,
      { shopId: context.shopId, ownerKind: query.ownerKind, ownerId: query.ownerId },
    );
    return { items: found.map(presentAttachment) };
  });
}

/**
 * The picture. Whatever it is taken for, a browser runs nothing of it: its kind is stated, guessing
 * is off, and the answer is a sandbox.
 */
export async function showPhoto(
  context: Context,
  fileId: string,
  size: 'full' | 'small',
): Promise<RawReply> {
  const photo = await withTenant(context, async () => {
    const attachment = found(
      await row<{
        owner_kind: OwnerKind;
        owner_id: string;
        content_type: string;
        sha256: string;
        small_sha256: string | null;
      }>(
        `select owner_kind, owner_id, content_type, sha256, small_sha256 from attachments
         where shop_id = $shopId and id = $fileId and owner_kind in ('job', 'call', 'store')`,
        { shopId: context.shopId, fileId },
      ),
    );
    await clientOfOwner(context, attachment.owner_kind, attachment.owner_id);
    return attachment;
  });
  const small = size === 'small' && photo.small_sha256 !== null;
  const sha256 = small && photo.small_sha256 ? photo.small_sha256 : photo.sha256;
  if (!(await files().has(context.shopId, sha256))) throw notFound();
  const content = await files().get(context.shopId, sha256);
  return new RawReply((response) => {
    response
      .status(200)
      .set({
        'Content-Type': small ? 'image/webp' : photo.content_type,
        'Content-Disposition': 'inline',
        'Content-Security-Policy': "default-src 'none'; sandbox",
        'X-Content-Type-Options': 'nosniff',
        'Cross-Origin-Resource-Policy': 'same-origin',
        'Cache-Control': 'private, max-age=31536000, immutable',
        ETag: `"${sha256}"`,
      })
      .send(content);
  });
}
