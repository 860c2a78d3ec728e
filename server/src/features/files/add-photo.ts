import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { cleanFileName } from '../../core/files/file-name';
import { files } from '../../core/files/file-store';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, invalid, problem } from '../../core/problems/problem';
import { type AttachmentRow, attachmentColumns, presentAttachment } from './attachment-row';
import { clientOfOwner, refuseProofByOthers } from './owner';
import { readPhoto } from './photo';

const mostPhotos = 60;

/**
 * Keeps a photo. The bytes are put under their hash before the row is written: a row always has
 * its bytes, and bytes without a row harm nobody. The same id again is the same photo.
 */
export async function addPhoto(
  context: Context,
  body: InputOf<'files.add'>['body'],
  file: { name: string; content: Buffer } | undefined,
): Promise<AnswerOf<'files.add'>> {
  refuseProofByOthers(context, body.ownerKind);
  if (!file) throw invalid([{ pointer: '/file', detail: 'is missing' }]);
  const clientId = await withTenant(context, () =>
    clientOfOwner(context, body.ownerKind, body.ownerId),
  );
  const photo = await readPhoto(file.content);
  const sha256 = await files().put(context.shopId, photo.full);
  const smallSha256 = await files().put(context.shopId, photo.small);
  return withTenant(context, async () => {
    const id = body.id ?? uuid();
    const owner = { ownerKind: body.ownerKind, ownerId: body.ownerId };
    const others = await row<{ n: number }>(
      `select count(*)::int as n from attachments where shop_id = $shopId
         and owner_kind = $ownerKind and owner_id = $ownerId and id <> $id`,
      { shopId: context.shopId, id, ...owner },
    );
    if (found(others).n >= mostPhotos) {
      throw problem('conflict', `There are ${mostPhotos} photos already, which is the most.`);
    }
    const [added] = await write<AttachmentRow>(
      `insert into attachments (shop_id, id, client_id, owner_kind, owner_id, name, content_type,
         bytes, sha256, small_sha256, added_by)
       values ($shopId, $id, $clientId, $ownerKind, $ownerId, $name, $contentType, $bytes, $sha256,
         $smallSha256, $userId)
       on conflict (shop_id, id) do nothing returning ${attachmentColumns}`,
      {
        shopId: context.shopId,
        id,
        clientId,
        ...owner,
        name: cleanFileName(file.name),
        contentType: photo.contentType,
        bytes: photo.full.length,
        sha256,
        smallSha256,
        userId: context.userId,
      },
    );
    if (added) {
      await announce(context, 'files', id, clientId);
      return presentAttachment(added);
    }
    const first = await row<AttachmentRow>(
      `select ${attachmentColumns} from attachments where shop_id = $shopId and id = $id
         and owner_kind = $ownerKind and owner_id = $ownerId and sha256 = $sha256`,
      { shopId: context.shopId, id, ...owner, sha256 },
    );
    if (!first) throw problem('conflict', 'Another photo has this id.');
    return presentAttachment(first);
  });
}
