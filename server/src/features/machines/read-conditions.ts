import { type Context } from '../../core/context';
import { type Bind, rows } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';

export type Condition = AnswerOf<'conditions.create'>;

interface ConditionRow extends Omit<Condition, 'machine' | 'clearedAt' | 'createdAt'> {
  machineId: string | null;
  bay: string | null;
  clearedAt: Date | null;
  createdAt: Date;
}

interface Which {
  storeId?: string;
  machineId?: string;
  conditionId?: string;
  show: 'open' | 'cleared' | 'all';
}

/** Conditions of a store with its machines, or of one machine; newest first. In a transaction. */
export async function conditionsOf(context: Context, which: Which): Promise<Condition[]> {
  const bind: Bind = { shopId: context.shopId };
  const where = ['d.shop_id = $shopId'];
  if (which.storeId) {
    where.push('d.store_id = $storeId');
    bind.storeId = which.storeId;
  }
  if (which.machineId) {
    where.push('d.machine_id = $machineId');
    bind.machineId = which.machineId;
  }
  if (which.conditionId) {
    where.push('d.id = $conditionId');
    bind.conditionId = which.conditionId;
  }
  if (which.show !== 'all') {
    where.push(`d.cleared_at is ${which.show === 'cleared' ? 'not ' : ''}null`);
  }
  const found = await rows<ConditionRow>(
    `select d.id, d.store_id as "storeId", d.machine_id as "machineId", m.bay, d.kind, d.words,
       d.extra_minutes as "extraMinutes", d.tool, d.cleared_at as "clearedAt",
       d.created_at as "createdAt", d.version
     from conditions d left join machines m on m.shop_id = d.shop_id and m.id = d.machine_id
     where ${where.join(' and ')} order by d.created_at desc, d.id desc limit 200`,
    bind,
  );
  return found.map(({ machineId, bay, clearedAt, createdAt, ...condition }) => ({
    ...condition,
    machine: machineId && bay ? { id: machineId, bay } : null,
    clearedAt: instantOrNull(clearedAt),
    createdAt: createdAt.toISOString(),
  }));
}
