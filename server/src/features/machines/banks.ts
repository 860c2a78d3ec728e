import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, invalid } from '../../core/problems/problem';
import { orStale } from '../../core/versions';

type Bank = AnswerOf<'banks.create'>;

const returned = 'id, store_id as "storeId", letter, words, version';

export function createBank(
  context: Context,
  storeId: string,
  body: InputOf<'banks.create'>['body'],
): Promise<Bank> {
  return withTenant(context, async () => {
    const store = found(
      await row<{ client_id: string }>(
        'select client_id from stores where shop_id = $shopId and id = $storeId',
        { shopId: context.shopId, storeId },
      ),
    );
    await refuseLetterTaken(context, storeId, body.letter, null);
    const [bank] = await write<Bank>(
      `insert into banks (shop_id, id, client_id, store_id, letter, words)
       values ($shopId, $id, $clientId, $storeId, $letter, $words) returning ${returned}`,
      { ...body, shopId: context.shopId, id: uuid(), clientId: store.client_id, storeId },
    );
    const added = found(bank);
    await record(context, 'bank added', { kind: 'bank', id: added.id });
    await announce(context, 'stores', storeId, store.client_id);
    return added;
  });
}

/** With the letter of a bank the bays of its machines are called otherwise. */
export function changeBank(
  context: Context,
  bankId: string,
  version: number,
  body: InputOf<'banks.change'>['body'],
): Promise<Bank> {
  return withTenant(context, async () => {
    const key = { shopId: context.shopId, bankId };
    const before = found(
      await row<{ store_id: string; client_id: string; letter: string }>(
        'select store_id, client_id, letter from banks where shop_id = $shopId and id = $bankId',
        key,
      ),
    );
    if (body.letter) await refuseLetterTaken(context, before.store_id, body.letter, bankId);
    const { set, bind } = changes(body, { letter: 'letter', words: 'words' });
    const bank = await orStale(
      await write<Bank>(
        `update banks set ${set} where shop_id = $shopId and id = $bankId and version = $version
         returning ${returned}`,
        { ...bind, ...key, version },
      ),
      () => row('select 1 from banks where shop_id = $shopId and id = $bankId', key),
    );
    if (bank.letter !== before.letter) {
      await write(
        `update machines set bay = $letter || '-' || lpad(bay_number::text,
           greatest(2, length(bay_number::text)), '0')
         where shop_id = $shopId and bank_id = $bankId`,
        { ...key, letter: bank.letter },
      );
    }
    await record(context, 'bank changed', { kind: 'bank', id: bankId });
    await announce(context, 'stores', before.store_id, before.client_id);
    return bank;
  });
}

async function refuseLetterTaken(
  context: Context,
  storeId: string,
  letter: string,
  exceptId: string | null,
): Promise<void> {
  const other = await row(
    `select 1 from banks where shop_id = $shopId and store_id = $storeId and letter = $letter
       and id is distinct from $exceptId::uuid`,
    { shopId: context.shopId, storeId, letter, exceptId },
  );
  if (other) throw invalid([{ pointer: '/letter', detail: 'is another bank of the store' }]);
}
