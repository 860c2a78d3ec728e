import { type DayCount } from '@lib/domain';
import { type Context } from './context';
import { row } from './database/tenancy';
import { found } from './problems/problem';

/** What many features need to know of the shop they work for. */
export interface ShopFacts {
  name: string;
  zone: string;
  currency: string;
  locale: string;
  cardAccount: string | null;
  address: string;
  taxNumber: string;
  phone: string;
  mailName: string;
  replyTo: string | null;
  statementDay: number;
  statementHour: number;
  closeBySchedule: boolean;
  termsDays: number;
  lateChargeBasisPoints: number;
  lateChargeDayCount: DayCount;
}

/** Inside a tenant transaction. A shop whose settings are not made yet has the usual ones. */
export async function shopFacts(context: Pick<Context, 'shopId'>): Promise<ShopFacts> {
  return found(
    await row<ShopFacts>(
      `select s.name, s.zone, s.currency, s.locale, s.card_account as "cardAccount",
         coalesce(t.address, '') as address, coalesce(t.tax_number, '') as "taxNumber",
         coalesce(t.phone, '') as phone, coalesce(t.mail_name, '') as "mailName",
         t.reply_to as "replyTo", coalesce(t.statement_day, 1) as "statementDay",
         coalesce(t.statement_hour, 6) as "statementHour",
         coalesce(t.close_by_schedule, true) as "closeBySchedule",
         coalesce(t.terms_days, 14) as "termsDays",
         coalesce(t.late_charge_basis_points, 0) as "lateChargeBasisPoints",
         coalesce(t.late_charge_day_count, 'actual_365') as "lateChargeDayCount"
       from shops s left join shop_settings t on t.shop_id = s.id
       where s.id = $shopId`,
      { shopId: context.shopId },
    ),
  );
}
