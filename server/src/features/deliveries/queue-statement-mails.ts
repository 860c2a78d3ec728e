import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { rows, write } from '../../core/database/tenancy';
import { messageIdOf } from '../../core/mail/message-id';
import { monthName } from '../statements/document-names';

interface Recipient {
  id: string;
  name: string;
  email: string;
  clientId: string;
  month: string;
  storeName: string;
  locale: string;
}

/** Contacts who get a store's statements, as SQL; `s` is the store. */
export const recipientsOfStore = `select k.id, k.name, k.email, k.client_id from contacts k
  where k.shop_id = s.shop_id and k.client_id = s.client_id
    and (k.store_id is null or k.store_id = s.id)
    and k.gets_statements and k.email is not null and k.ended_at is null`;

/**
 * Puts a statement in line for everybody who gets it and is not in line yet. One mail a statement
 * and contact, by its key, with a Message-ID made of the same two.
 *
 * @returns how many were added
 */
export async function queueStatementMails(
  context: Pick<Context, 'shopId'>,
  statementId: string,
  from: string,
): Promise<number> {
  const contacts = await rows<Recipient>(
    `select r.id, r.name, r.email, r.client_id as "clientId", t.month, s.name as "storeName",
       h.locale
     from statements t
     join shops h on h.id = t.shop_id
     join stores s on s.shop_id = t.shop_id and s.id = t.store_id
     cross join lateral (${recipientsOfStore}) r
     where t.shop_id = $shopId and t.id = $statementId
     order by r.id`,
    { shopId: context.shopId, statementId },
  );
  let added = 0;
  for (const contact of contacts) {
    const made = await write<{ id: string }>(
      `insert into deliveries (shop_id, id, client_id, kind, statement_id, contact_id, recipient,
         recipient_name, subject, dedupe_key, message_id)
       values ($shopId, $id, $clientId, 'statement', $statementId, $contactId, $recipient, $name,
         $subject, $key, $messageId)
       on conflict (shop_id, dedupe_key) do nothing returning id`,
      {
        shopId: context.shopId,
        id: uuid(),
        clientId: contact.clientId,
        statementId,
        contactId: contact.id,
        recipient: contact.email,
        name: contact.name,
        subject: `Statement for ${monthName(contact.month, contact.locale)}, ${contact.storeName}`,
        key: `statement:${statementId}:${contact.id}`,
        messageId: messageIdOf(`statement.${statementId}.${contact.id}`, from),
      },
    );
    added += made.length;
  }
  return added;
}
