import { type Context } from '../../core/context';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { found } from '../../core/problems/problem';
import { refuseOtherStore } from './own-store';

type Floor = AnswerOf<'stores.floor'>;
type Bank = Floor['banks'][number];
type FloorMachine = Bank['machines'][number];

/** The floor in three queries, however many machines stand on it. */
export function showFloor(context: Context, storeId: string): Promise<Floor> {
  return withTenant(context, async () => {
    refuseOtherStore(context, storeId);
    const bind = { shopId: context.shopId, storeId };
    const store = found(
      await row<{
        id: string;
        number: string;
        name: string;
        client_id: string;
        client_name: string;
      }>(
        `select s.id, s.number, s.name, c.id as client_id, c.name as client_name
         from stores s join clients c on c.shop_id = s.shop_id and c.id = s.client_id
         where s.shop_id = $shopId and s.id = $storeId`,
        bind,
      ),
    );
    const banks = await rows<Omit<Bank, 'machines'>>(
      `select id, letter, words, version from banks
       where shop_id = $shopId and store_id = $storeId order by length(letter), letter`,
      bind,
    );
    const machines = await rows<
      Omit<FloorMachine, 'stateSince'> & { bankId: string; stateSince: Date }
    >(
      `select m.id, m.bank_id as "bankId", m.bay, m.bay_number as "bayNumber", m.kind, m.energy,
         m.make, m.model, m.state, m.state_since as "stateSince", m.version,
         coalesce(d.n, 0) as conditions, coalesce(k.n, 0) as "openCalls"
       from machines m
       left join (select machine_id, count(*)::int as n from conditions
         where shop_id = $shopId and store_id = $storeId and cleared_at is null
         group by machine_id) d on d.machine_id = m.id
       left join (select machine_id, count(*)::int as n from calls
         where shop_id = $shopId and store_id = $storeId and state in ('open', 'planned')
         group by machine_id) k on k.machine_id = m.id
       where m.shop_id = $shopId and m.store_id = $storeId and m.state <> 'retired'
       order by m.bay_number, m.id`,
      bind,
    );
    const inBanks = new Map<string, FloorMachine[]>(banks.map((bank) => [bank.id, []]));
    for (const { bankId, ...machine } of machines) {
      const stateSince = machine.stateSince.toISOString();
      inBanks.get(bankId)?.push({ ...machine, stateSince });
    }
    return {
      store: {
        id: store.id,
        number: store.number,
        name: store.name,
        client: { id: store.client_id, name: store.client_name },
      },
      banks: banks.map((bank) => ({ ...bank, machines: inBanks.get(bank.id) ?? [] })),
    };
  });
}
