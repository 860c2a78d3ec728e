import { type Context } from '../../core/context';
import { row } from '../../core/database/tenancy';
import { invalid } from '../../core/problems/problem';
import { bayName } from './bay';

/** A bay of a bank, free for a machine. */
export interface FreeBay {
  clientId: string;
  storeId: string;
  bankId: string;
  bayNumber: number;
  bay: string;
}

/**
 * Finds the bay, the next free one when none is named. The bank is locked, so that two who place a
 * machine at once do not choose the same bay.
 */
export async function freeBay(
  context: Context,
  bankId: string,
  bayNumber: number | undefined,
): Promise<FreeBay> {
  const key = { shopId: context.shopId, bankId };
  const bank = await row<{ client_id: string; store_id: string; letter: string }>(
    `select client_id, store_id, letter from banks
     where shop_id = $shopId and id = $bankId for update`,
    key,
  );
  if (!bank) throw invalid([{ pointer: '/bankId', detail: 'is no bank of the shop' }]);
  const last = await row<{ n: number | null }>(
    `select max(bay_number) as n from machines
     where shop_id = $shopId and bank_id = $bankId and state <> 'retired'`,
    key,
  );
  const number = bayNumber ?? (last?.n ?? 0) + 1;
  const bay = bayName(bank.letter, number);
  const taken = await row(
    `select 1 from machines
     where shop_id = $shopId and store_id = $storeId and bay = $bay and state <> 'retired'`,
    { shopId: context.shopId, storeId: bank.store_id, bay },
  );
  if (taken) throw invalid([{ pointer: '/bayNumber', detail: `${bay} holds a machine already` }]);
  return { clientId: bank.client_id, storeId: bank.store_id, bankId, bayNumber: number, bay };
}
