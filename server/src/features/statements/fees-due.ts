import { type PriceBook } from '@lib/contracts';
import {
  type IsoDate,
  type Month,
  formatMoney,
  isExempt,
  lateCharge,
  monthBounds,
  previousMonth,
  prorate,
  rateFor,
  taxByLine,
} from '@lib/domain';
import { type Context } from '../../core/context';
import { row, rows } from '../../core/database/tenancy';
import { type ShopFacts } from '../../core/shop-facts';
import { openStatements } from '../receivables/open-statements';
import { contractName, dayName } from './document-names';

/** A charge that the close itself adds: a contract's fee of a month, or a charge for lateness. */
export interface FeeDue {
  kind: 'fee' | 'late_charge';
  storeId: string;
  clientId: string;
  contractId: string | null;
  month: Month;
  date: IsoDate;
  words: string;
  net: number;
  taxBasisPoints: number;
  tax: number;
  total: number;
  /** The same charge has the same key, so that it is made once. */
  naturalKey: string;
}

interface StoreFacts {
  storeId: string;
  clientId: string;
  taxPlace: string;
  taxExempt: boolean;
}

interface ContractFacts extends StoreFacts {
  contractId: string;
  number: number;
  name: string;
  startsOn: IsoDate;
  endsOn: IsoDate | null;
  monthlyFee: number;
}

/** What the fees of one month are taxed by. */
type Taxes = PriceBook['taxes'] | null;

/**
 * The months that a close of `month` takes in: it and those before it that were never closed, so
 * that no month's fee is lost when one is left out.
 */
export async function monthsToState(
  context: Pick<Context, 'shopId'>,
  month: Month,
): Promise<Month[]> {
  const last = await row<{ month: Month }>(
    `select max(month) as month from statement_runs where shop_id = $shopId and month < $month`,
    { shopId: context.shopId, month },
  );
  const months = [month];
  // A year back at most: who left out more has a reason, and the contract's fees are old quarrels.
  while (last?.month && months.length < 12) {
    const before = previousMonth(months[0] ?? month);
    if (before <= last.month) break;
    months.unshift(before);
  }
  return months;
}

/** The fees and late charges of some stores that are not made yet. Inside a tenant transaction. */
export async function feesDue(
  context: Pick<Context, 'shopId'>,
  shop: ShopFacts,
  months: readonly Month[],
  storeIds: readonly string[],
): Promise<FeeDue[]> {
  const due: FeeDue[] = [];
  for (const month of months) {
    const taxes = await taxesOf(context, monthBounds(month, shop.zone).lastDay);
    due.push(...(await contractFees(context, shop, month, storeIds, taxes)));
  }
  const last = months.at(-1);
  if (last && shop.lateChargeBasisPoints > 0) {
    const since = previousMonth(months[0] ?? last);
    due.push(...(await lateCharges(context, shop, last, since, storeIds)));
  }
  return withoutMade(context, due);
}

async function withoutMade(context: Pick<Context, 'shopId'>, due: FeeDue[]): Promise<FeeDue[]> {
  if (due.length === 0) return due;
  const made = await rows<{ naturalKey: string }>(
    `select natural_key as "naturalKey" from fees
     where shop_id = $shopId and natural_key = any ($keys::text[])`,
    { shopId: context.shopId, keys: due.map((fee) => fee.naturalKey) },
  );
  const keys = new Set(made.map((fee) => fee.naturalKey));
  return due.filter((fee) => !keys.has(fee.naturalKey));
}

async function taxesOf(context: Pick<Context, 'shopId'>, on: IsoDate): Promise<Taxes> {
  const edition = await row<{ taxes: Taxes }>(
    `select book -> 'taxes' as taxes from editions
     where shop_id = $shopId and valid_from <= $on
     order by valid_from desc, number desc limit 1`,
    { shopId: context.shopId, on },
  );
  return edition?.taxes ?? null;
}

async function contractFees(
  context: Pick<Context, 'shopId'>,
  shop: ShopFacts,
  month: Month,
  storeIds: readonly string[],
  taxes: Taxes,
): Promise<FeeDue[]> {
  const { firstDay, lastDay } = monthBounds(month, shop.zone);
  const contracts = await rows<ContractFacts>(
    `select cs.store_id as "storeId", cs.client_id as "clientId", c.id as "contractId", c.number,
       c.name, c.starts_on as "startsOn", c.ends_on as "endsOn", cs.monthly_fee as "monthlyFee",
       s.tax_place as "taxPlace", l.tax_exempt as "taxExempt"
     from contract_stores cs
     join contracts c on c.shop_id = cs.shop_id and c.id = cs.contract_id
     join stores s on s.shop_id = cs.shop_id and s.id = cs.store_id
     join clients l on l.shop_id = cs.shop_id and l.id = cs.client_id
     where cs.shop_id = $shopId and cs.store_id = any ($storeIds::uuid[]) and cs.monthly_fee > 0
       and c.starts_on <= $lastDay and (c.ends_on is null or c.ends_on >= $firstDay)
     order by c.number`,
    { shopId: context.shopId, storeIds, firstDay, lastDay },
  );
  return contracts.flatMap((contract) => {
    const from = contract.startsOn > firstDay ? contract.startsOn : firstDay;
    const to = contract.endsOn && contract.endsOn < lastDay ? contract.endsOn : lastDay;
    const net = prorate(contract.monthlyFee, { from: firstDay, to: lastDay }, from, to);
    if (net === 0) return [];
    const whole = from === firstDay && to === lastDay;
    const span = whole ? '' : `, ${dayName(from, shop.locale)} to ${dayName(to, shop.locale)}`;
    return [
      {
        kind: 'fee' as const,
        storeId: contract.storeId,
        clientId: contract.clientId,
        contractId: contract.contractId,
        month,
        date: lastDay,
        words: `Maintenance ${contractName(contract.number)} ${contract.name}${span}`,
        net,
        ...taxed(net, 'fee', contract, taxes, lastDay),
        naturalKey: `fee:${contract.contractId}:${contract.storeId}:${month}`,
      },
    ];
  });
}

/** One charge a store and month, on what is past due, for the days since the month before ended. */
async function lateCharges(
  context: Pick<Context, 'shopId'>,
  shop: ShopFacts,
  month: Month,
  since: Month,
  storeIds: readonly string[],
): Promise<FeeDue[]> {
  const { lastDay } = monthBounds(month, shop.zone);
  const chargedUntil = monthBounds(since, shop.zone).lastDay;
  const overdue = (await openStatements(context, storeIds)).filter((s) => s.dueOn < lastDay);
  if (overdue.length === 0) return [];
  const taxes = await taxesOf(context, lastDay);
  const stores = await rows<StoreFacts>(
    `select s.id as "storeId", s.client_id as "clientId", s.tax_place as "taxPlace",
       c.tax_exempt as "taxExempt"
     from stores s join clients c on c.shop_id = s.shop_id and c.id = s.client_id
     where s.shop_id = $shopId and s.id = any ($storeIds::uuid[])`,
    { shopId: context.shopId, storeIds: [...new Set(overdue.map((s) => s.storeId))] },
  );
  return stores.flatMap((store) => {
    const items = overdue.filter((item) => item.storeId === store.storeId);
    const net = items.reduce(
      (sum, { open, dueOn }) =>
        sum +
        lateCharge({
          principal: open,
          annualBasisPoints: shop.lateChargeBasisPoints,
          from: dueOn > chargedUntil ? dueOn : chargedUntil,
          to: lastDay,
          dayCount: shop.lateChargeDayCount,
        }),
      0,
    );
    if (net === 0) return [];
    const owed = formatMoney(
      items.reduce((sum, { open }) => sum + open, 0),
      shop.currency,
      shop.locale,
    );
    return [
      {
        kind: 'late_charge' as const,
        storeId: store.storeId,
        clientId: store.clientId,
        contractId: null,
        month,
        date: lastDay,
        words: `Late charge on ${owed}, ${shop.lateChargeBasisPoints / 100} % a year`,
        net,
        ...taxed(net, 'late_charge', store, taxes, lastDay),
        naturalKey: `late:${store.storeId}:${month}`,
      },
    ];
  });
}

function taxed(
  net: number,
  kind: 'fee' | 'late_charge',
  store: StoreFacts,
  taxes: Taxes,
  on: IsoDate,
): { taxBasisPoints: number; tax: number; total: number } {
  const exemption = store.taxExempt ? { from: null, until: null, kinds: null } : null;
  if (!taxes || isExempt(exemption, { kind, on })) return { taxBasisPoints: 0, tax: 0, total: net };
  const { basisPoints } = rateFor(taxes.rates, { kind, place: store.taxPlace, on });
  const [tax = 0] = taxByLine([{ amount: net, basisPoints }], taxes.rounding);
  return { taxBasisPoints: basisPoints, tax, total: net + tax };
}
