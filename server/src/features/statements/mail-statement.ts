import { config } from '../../core/config';
import { type Context } from '../../core/context';
import { row, withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { enqueue } from '../../core/jobs/boss';
import { found, problem } from '../../core/problems/problem';
import { queueStatementMails } from '../deliveries/queue-statement-mails';

/** Mails a statement to contacts who were not there when it was sent; nobody gets it twice. */
export function mailStatement(
  context: Context,
  statementId: string,
): Promise<AnswerOf<'statements.mail'>> {
  return withTenant(context, async () => {
    const statement = found(
      await row<{ ready: boolean }>(
        `select exists (select 1 from attachments f where f.shop_id = s.shop_id
           and f.owner_kind = 'statement' and f.owner_id = s.id) as ready
         from statements s where s.shop_id = $shopId and s.id = $statementId`,
        { shopId: context.shopId, statementId },
      ),
    );
    if (!statement.ready)
      throw problem('conflict', 'The PDF is being made: try again in a minute.');
    const added = await queueStatementMails(context, [statementId], config().mail.from);
    if (added > 0) await enqueue('deliveries-send', { shopId: context.shopId });
    return { added };
  });
}
