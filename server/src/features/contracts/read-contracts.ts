import { describeRule, tradeDayOf, validateRule } from '@lib/domain';
import { type Coverage } from '@lib/contracts';
import { type Context } from '../../core/context';
import { type Bind, row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { found } from '../../core/problems/problem';
import { shopFacts } from '../../core/shop-facts';
import { showClosures } from './closures';
import { nextRounds } from './next-rounds';

type Item = AnswerOf<'contracts.list'>['items'][number];
type Shown = AnswerOf<'contracts.show'>;

interface ContractRow {
  id: string;
  number: number;
  name: string;
  clientId: string;
  clientName: string;
  rule: string;
  startsOn: string;
  endsOn: string | null;
  startTime: string;
  shift: Shown['shift'];
  coverage: Partial<Coverage>;
  techMembershipId: string | null;
  techName: string | null;
  stores: number;
  monthlyFee: number;
  nextRoundOn: string | null;
  version: number;
}

const from = `contracts k join clients c on c.shop_id = k.shop_id and c.id = k.client_id`;

const columns = `k.id, k.number, k.name, k.client_id as "clientId", c.name as "clientName", k.rule,
  k.starts_on as "startsOn", k.ends_on as "endsOn", k.start_time as "startTime", k.shift,
  k.coverage, k.tech_membership_id as "techMembershipId",
  (select m.name from memberships m where m.shop_id = k.shop_id and m.id = k.tech_membership_id)
    as "techName",
  (select count(*)::int from contract_stores s
   where s.shop_id = k.shop_id and s.contract_id = k.id) as stores,
  (select coalesce(sum(s.monthly_fee), 0)::bigint from contract_stores s
   where s.shop_id = k.shop_id and s.contract_id = k.id) as "monthlyFee",
  (select min(r.planned_on) from rounds r where r.shop_id = k.shop_id and r.contract_id = k.id
   and r.state = 'planned' and r.planned_on >= $today) as "nextRoundOn",
  k.version`;

function presentItem(contract: ContractRow, today: string): Item {
  const { startsOn, endsOn } = contract;
  return {
    id: contract.id,
    number: contract.number,
    name: contract.name,
    clientId: contract.clientId,
    clientName: contract.clientName,
    ruleWords: describeRule(contract.rule, startsOn),
    startsOn,
    endsOn,
    state: endsOn !== null && endsOn < today ? 'ended' : startsOn > today ? 'coming' : 'running',
    stores: contract.stores,
    monthlyFee: contract.monthlyFee,
    nextRoundOn: contract.nextRoundOn,
    version: contract.version,
  };
}

const stateConditions: Record<Item['state'], string> = {
  coming: 'k.starts_on > $today',
  running: 'k.starts_on <= $today and (k.ends_on is null or k.ends_on >= $today)',
  ended: 'k.ends_on < $today',
};

export function listContracts(
  context: Context,
  query: InputOf<'contracts.list'>['query'],
): Promise<AnswerOf<'contracts.list'>> {
  return withTenant(context, async () => {
    const today = tradeDayOf(context.now, (await shopFacts(context)).zone);
    const bind: Bind = { shopId: context.shopId, today };
    const where = ['k.shop_id = $shopId', ...searched(query.q, ['k.name', 'c.name'], bind)];
    if (query.clientId) {
      bind.clientId = query.clientId;
      where.push('k.client_id = $clientId');
    }
    if (query.storeId) {
      bind.storeId = query.storeId;
      where.push(`exists (select 1 from contract_stores s where s.shop_id = k.shop_id
        and s.contract_id = k.id and s.store_id = $storeId)`);
    }
    if (query.state) where.push(stateConditions[query.state]);
    return page<ContractRow, Item>(
      {
        select: `select ${columns} from ${from}`,
        from,
        where,
        bind,
        sort:
          query.sort === 'name'
            ? { column: 'k.name', type: 'text' }
            : { column: 'k.starts_on', type: 'date', descending: true },
        id: 'k.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (contract) => presentItem(contract, today),
    );
  });
}

export function showContract(context: Context, contractId: string): Promise<Shown> {
  return withTenant(context, async () => {
    const today = tradeDayOf(context.now, (await shopFacts(context)).zone);
    const bind = { shopId: context.shopId, contractId };
    const contract = found(
      await row<ContractRow>(
        `select ${columns} from ${from} where k.shop_id = $shopId and k.id = $contractId`,
        { ...bind, today },
      ),
    );
    const storeList = await rows<Shown['storeList'][number]>(
      `select s.store_id as "storeId", t.name as "storeName", s.monthly_fee as "monthlyFee"
       from contract_stores s join stores t on t.shop_id = s.shop_id and t.id = s.store_id
       where s.shop_id = $shopId and s.contract_id = $contractId order by t.name, t.id`,
      bind,
    );
    const { labour = false, parts = false, trip = false, kinds = [] } = contract.coverage;
    return {
      ...presentItem(contract, today),
      rule: contract.rule,
      startTime: contract.startTime,
      shift: contract.shift,
      coverage: { labour, parts, trip, kinds },
      techMembershipId: contract.techMembershipId,
      techName: contract.techName,
      storeList,
      nextRounds: nextRounds(contract, await showClosures(context), today),
    };
  });
}

/** What a rule means, while it is typed. */
export function previewRule(
  context: Context,
  query: InputOf<'contracts.preview'>['query'],
): Promise<AnswerOf<'contracts.preview'>> {
  return withTenant(context, async () => {
    const verdict = validateRule(query.rule, { date: query.startsOn });
    if (!verdict.valid) {
      return { valid: false, problem: verdict.problem, words: null, nextRounds: [] };
    }
    const today = tradeDayOf(context.now, (await shopFacts(context)).zone);
    const contract = { ...query, endsOn: query.endsOn ?? null };
    return {
      valid: true,
      problem: null,
      words: describeRule(query.rule, query.startsOn),
      nextRounds: nextRounds(
        contract,
        await showClosures(context),
        query.startsOn > today ? query.startsOn : today,
      ),
    };
  });
}
