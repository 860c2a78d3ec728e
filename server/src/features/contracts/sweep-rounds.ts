import { type Context } from '../../core/context';
import { withTenant, write } from '../../core/database/tenancy';
import { planRounds } from './plan-rounds';

/** For the sweep: rounds follow what became of their visits, and what falls due is planned. */
export function sweepRounds(context: Context): Promise<number> {
  return withTenant(context, async () => {
    await write(
      `update rounds r set state = case v.state when 'completed' then 'done' else 'skipped' end
       from visits v
       where r.shop_id = $shopId and r.state = 'planned' and v.shop_id = r.shop_id
         and v.id = r.visit_id and v.state in ('completed', 'cancelled')`,
      { shopId: context.shopId },
    );
    return planRounds(context);
  });
}
