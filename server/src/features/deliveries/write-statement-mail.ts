import { type Config } from '../../core/config';
import { type Context } from '../../core/context';
import { files } from '../../core/files/file-store';
import { type Mail } from '../../core/mail/mailer';
import { type ShopFacts } from '../../core/shop-facts';
import { type DueMail } from './mail-line';
import { statementLetter } from './statement-letter';

/** A statement's mail with its PDF, ready to be handed over. */
export async function writeStatementMail(
  context: Context,
  shop: ShopFacts,
  config: Config,
  due: DueMail,
): Promise<Mail> {
  if (!due.sha256) throw new Error('the PDF is missing');
  const letter = statementLetter({
    shop,
    recipientName: due.recipientName,
    subject: due.subject,
    snapshot: due.snapshot,
    url: `${config.publicUrl}/client/statements/${due.statementId}`,
  });
  return {
    ...letter,
    to: { name: due.recipientName, address: due.recipient },
    subject: due.subject,
    messageId: due.messageId,
    fromName: shop.mailName || shop.name,
    replyTo: shop.replyTo,
    attachments: [
      {
        filename: due.fileName ?? 'statement.pdf',
        content: await files().get(context.shopId, due.sha256),
        contentType: 'application/pdf',
      },
    ],
  };
}
