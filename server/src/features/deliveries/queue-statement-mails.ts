import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { rows, write } from '../../core/database/tenancy';
import { messageIdOf } from '../../core/mail/message-id';
import { monthName } from '../statements/document-names';

interface Recipient {
  statementId: string;
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
 * Puts statements in line for everybody who gets them and is not in line yet. One mail a statement
 * and contact, by its key, with a Message-ID made of the same two.
 *
 * @returns how many were added
 */
export async function queueStatementMails(
  context: Pick<Context, 'shopId'>,
  statementIds: readonly string[],
  from: string,
): Promise<number> {
  const recipients = await rows<Recipient>(
    `select t.id as "statementId", r.id, r.name, r.email, r.client_id as "clientId", t.month,
       s.name as "storeName", h.locale
     from statements t
     join shops h on h.id = t.shop_id
     join stores s on s.shop_id = t.shop_id and s.id = t.store_id
     cross join lateral (${recipientsOfStore}) r
     where t.shop_id = $shopId and t.id = any ($statementIds::uuid[])
     order by t.number, r.id`,
    { shopId: context.shopId, statementIds },
  );
  if (recipients.length === 0) return 0;
  const added = await write<{ id: string }>(
    `insert into deliveries (shop_id, id, client_id, kind, statement_id, contact_id, recipient,
       recipient_name, subject, dedupe_key, message_id)
     select $shopId, m.id, m.client_id, 'statement', m.statement_id, m.contact_id, m.recipient,
       m.recipient_name, m.subject, m.dedupe_key, m.message_id
     from jsonb_to_recordset($mails::jsonb) as m (id uuid, client_id uuid, statement_id uuid,
       contact_id uuid, recipient text, recipient_name text, subject text, dedupe_key text,
       message_id text)
     on conflict (shop_id, dedupe_key) do nothing returning id`,
    {
      shopId: context.shopId,
      mails: JSON.stringify(recipients.map((recipient) => mailFor(recipient, from))),
    },
  );
  return added.length;
}

function mailFor(recipient: Recipient, from: string) {
  const { statementId, id: contactId, month, locale, storeName } = recipient;
  return {
    id: uuid(),
    client_id: recipient.clientId,
    statement_id: statementId,
    contact_id: contactId,
    recipient: recipient.email,
    recipient_name: recipient.name,
    subject: `Statement for ${monthName(month, locale)}, ${storeName}`,
    dedupe_key: `statement:${statementId}:${contactId}`,
    message_id: messageIdOf(`statement.${statementId}.${contactId}`, from),
  };
}
