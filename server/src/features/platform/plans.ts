import { v7 as uuid } from 'uuid';
import { type PlatformContext } from '../../core/context';
import { changes } from '../../core/database/changes';
import { platformRow, platformRows, withPlatform } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { found, problem } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { planColumns, type PlanRow, presentPlan } from '../subscription/subscription-row';
import { recordPlatform } from './record-platform';

type Plan = AnswerOf<'platform.createPlan'>;

export async function listAllPlans(): Promise<AnswerOf<'platform.plans'>> {
  const plans = await platformRows<PlanRow & { shops: number }>(
    `select ${planColumns},
       (select count(*)::int from subscriptions b where b.plan_id = p.id) as shops
     from plans p order by p.offered desc, p.monthly_amount, p.name`,
  );
  return { items: plans.map((plan) => ({ ...presentPlan(plan), shops: plan.shops })) };
}

/** The code makes a repeat harmless: the same plan again is the plan that stands. */
export function createPlan(
  context: PlatformContext,
  body: InputOf<'platform.createPlan'>['body'],
): Promise<Plan> {
  return withPlatform(async () => {
    const id = uuid();
    const [added] = await platformRows(
      `insert into plans (id, code, name, monthly_amount, currency, store_limit, machine_limit,
         crew_limit, trial_days, grace_days, offered)
       values ($id, $code, $name, $monthlyAmount, $currency, $storeLimit, $machineLimit, $crewLimit,
         $trialDays, $graceDays, $offered)
       on conflict (code) do nothing returning id`,
      { id, ...body },
    );
    if (added) await recordPlatform(context, 'plan added', null, { ...body });
    const stands = found(
      await platformRow<PlanRow>(`select ${planColumns} from plans p where p.code = $code`, {
        code: body.code,
      }),
    );
    const plan = presentPlan(stands);
    const same = Object.entries(body).every(([name, value]) => plan[name as keyof Plan] === value);
    if (!same) throw problem('conflict', `There is a plan ${body.code} already.`);
    return plan;
  });
}

/**
 * A price at the card payment service never changes: with another amount or name the next who choose
 * the plan get a new one, and who pays already goes on as agreed.
 */
export function editPlan(
  context: PlatformContext,
  planId: string,
  version: number,
  body: InputOf<'platform.editPlan'>['body'],
): Promise<Plan> {
  return withPlatform(async () => {
    const { set, bind } = changes(body, {
      name: 'name',
      monthlyAmount: 'monthly_amount',
      currency: 'currency',
      storeLimit: 'store_limit',
      machineLimit: 'machine_limit',
      crewLimit: 'crew_limit',
      trialDays: 'trial_days',
      graceDays: 'grace_days',
      offered: 'offered',
    });
    const repriced = body.monthlyAmount !== undefined || body.currency !== undefined;
    const plan = await orStale(
      await platformRows<PlanRow>(
        `update plans p set ${set}${repriced ? ', card_price = null' : ''}
         where p.id = $planId and p.version = $version returning ${planColumns}`,
        { ...bind, planId, version },
      ),
      () => platformRow('select 1 from plans where id = $planId', { planId }),
    );
    await recordPlatform(context, 'plan changed', null, { code: plan.code, ...body });
    return presentPlan(plan);
  });
}
