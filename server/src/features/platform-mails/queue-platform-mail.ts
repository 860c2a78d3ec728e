import { v7 as uuid } from 'uuid';
import { config } from '../../core/config';
import { inTenant, platformRows, write } from '../../core/database/tenancy';
import { enqueue, enqueueNow } from '../../core/jobs/boss';
import { messageIdOf } from '../../core/mail/message-id';
import { type PlatformMailParams, type PlatformMailTemplate } from './templates';

/**
 * Writes a mail into the outbox and wakes the worker, both in the transaction that is open: the mail
 * goes out if and only if that commits. The same `dedupeKey` twice is one mail.
 */
export async function queuePlatformMail<T extends PlatformMailTemplate>(mail: {
  to: string;
  template: T;
  params: PlatformMailParams[T];
  dedupeKey: string;
  shopId?: string;
}): Promise<void> {
  const id = uuid();
  const ofShop = inTenant();
  const statement = ofShop ? write : platformRows;
  // No column is named after "on conflict": the shop's role may insert here, and read nothing.
  await statement(
    `insert into platform_mails (id, shop_id, recipient, template, params, dedupe_key, message_id)
     values ($id, $shopId, $to, $template, $params, $dedupeKey, $messageId)
     on conflict do nothing`,
    {
      id,
      shopId: mail.shopId ?? null,
      to: mail.to,
      template: mail.template,
      params: JSON.stringify(mail.params),
      dedupeKey: mail.dedupeKey,
      messageId: messageIdOf(id, config().mail.from),
    },
  );
  await (ofShop ? enqueue : enqueueNow)('platform-mails-send', {});
}
