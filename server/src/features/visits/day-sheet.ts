import { type Context } from '../../core/context';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { tradeDayNow } from '../settings/trade-day';
import { initialsOf, presentVisit, type VisitRow, visitSelect } from './visit-row';

/** The visits of a day by tech, techs without any included, and those nobody is assigned to. */
export function showDaySheet(context: Context, on?: string): Promise<AnswerOf<'visits.daySheet'>> {
  return withTenant(context, async () => {
    const day = on ?? (await tradeDayNow(context));
    const bind = { shopId: context.shopId };
    const visits = await rows<VisitRow>(
      `${visitSelect} where v.shop_id = $shopId and v.planned_on = $day and v.state <> 'cancelled'
       order by v.window_start nulls last, v.number`,
      { ...bind, day },
    );
    const techs = await rows<{ membershipId: string; name: string; initials: string | null }>(
      `select m.id as "membershipId", m.name, p.initials
       from memberships m
       left join crew_profiles p on p.shop_id = m.shop_id and p.membership_id = m.id
       where m.shop_id = $shopId and (m.id = any ($assigned::uuid[])
         or (m.role = 'tech' and m.ended_at is null))
       order by m.name, m.id`,
      { ...bind, assigned: visits.map((v) => v.techMembershipId).filter((id) => id !== null) },
    );
    const open = await row<{ n: number }>(
      `select count(*)::int as n from calls where shop_id = $shopId and state = 'open'`,
      bind,
    );
    const of = (membershipId: string | null) =>
      visits
        .filter((visit) => visit.techMembershipId === membershipId)
        .map((visit) => presentVisit(context, visit));
    return {
      on: day,
      techs: techs.map((tech) => ({
        membershipId: tech.membershipId,
        name: tech.name,
        initials: tech.initials ?? initialsOf(tech.name),
        visits: of(tech.membershipId),
      })),
      unplaced: of(null),
      openCalls: open?.n ?? 0,
    };
  });
}
