import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { type Bind, row, rows, withTenant, write } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { shown } from '../../core/lists/shown';
import { announce } from '../../core/live/live';
import { found, invalid } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { leadsBack, type Successor, successorsOf } from './successor';

type Part = AnswerOf<'parts.show'>;

interface PartRow extends Omit<Part, 'successor' | 'endedAt'> {
  endedAt: Date | null;
}

const columns = `p.id, p.number, p.name, p.category, p.unit_cost as "unitCost",
  p.fixed_price as "fixedPrice", p.makers_part as "makersPart", p.scarce, p.supplier,
  p.superseded_by as "supersededBy", p.ended_at as "endedAt", p.version`;

export function listParts(
  context: Context,
  query: InputOf<'parts.list'>['query'],
): Promise<AnswerOf<'parts.list'>> {
  return withTenant(context, async () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      'p.shop_id = $shopId',
      ...shown(query.show, 'p.ended_at'),
      ...searched(query.q, ['p.number', 'p.name', 'p.category', 'p.supplier'], bind),
    ];
    if (query.category) {
      bind.category = query.category;
      where.push('p.category = $category');
    }
    const found = await page<PartRow, PartRow>(
      {
        select: `select ${columns} from parts p`,
        from: 'parts p',
        where,
        bind,
        sort: { column: `p.${query.sort}`, type: 'text' },
        id: 'p.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (part) => part,
    );
    const superseded = found.items.filter((part) => part.supersededBy).map((part) => part.id);
    const successors = await successorsOf(context, superseded);
    return { ...found, items: found.items.map((part) => present(part, successors.get(part.id))) };
  });
}

export function listCategories(context: Context): Promise<AnswerOf<'parts.categories'>> {
  return withTenant(context, async () => {
    const found = await rows<{ category: string }>(
      `select distinct category from parts where shop_id = $shopId and ended_at is null
       order by category limit 200`,
      { shopId: context.shopId },
    );
    return { items: found.map(({ category }) => category) };
  });
}

export function showPart(context: Context, partId: string): Promise<Part> {
  return withTenant(context, async () => {
    const part = found(
      await row<PartRow>(
        `select ${columns} from parts p where p.shop_id = $shopId and p.id = $partId`,
        { shopId: context.shopId, partId },
      ),
    );
    return present(part, (await successorsOf(context, [partId])).get(part.id));
  });
}

export function createPart(context: Context, body: InputOf<'parts.create'>['body']): Promise<Part> {
  return withTenant(context, async () => {
    await refuseTaken(context, body.number, null);
    const id = uuid();
    if (body.supersededBy) await refuseWrongSuccessor(context, id, body.supersededBy);
    await write(
      `insert into parts (shop_id, id, number, name, category, unit_cost, fixed_price, makers_part,
         scarce, supplier, superseded_by)
       values ($shopId, $id, $number, $name, $category, $unitCost, $fixedPrice, $makersPart,
         $scarce, $supplier, $supersededBy)`,
      {
        shopId: context.shopId,
        id,
        number: body.number,
        name: body.name,
        category: body.category,
        unitCost: body.unitCost,
        fixedPrice: body.fixedPrice ?? null,
        makersPart: body.makersPart ?? true,
        scarce: body.scarce ?? false,
        supplier: body.supplier ?? '',
        supersededBy: body.supersededBy ?? null,
      },
    );
    return noted(context, 'part added', id);
  });
}

export function changePart(
  context: Context,
  partId: string,
  version: number,
  body: InputOf<'parts.change'>['body'],
): Promise<Part> {
  return withTenant(context, async () => {
    if (body.number) await refuseTaken(context, body.number, partId);
    if (body.supersededBy) await refuseWrongSuccessor(context, partId, body.supersededBy);
    const { set, bind } = changes(body, {
      number: 'number',
      name: 'name',
      category: 'category',
      unitCost: 'unit_cost',
      fixedPrice: 'fixed_price',
      makersPart: 'makers_part',
      scarce: 'scarce',
      supplier: 'supplier',
      supersededBy: 'superseded_by',
    });
    await update(context, partId, version, set, bind);
    return noted(context, 'part changed', partId);
  });
}

export function endPart(context: Context, partId: string, version: number): Promise<Part> {
  return withTenant(context, async () => {
    await update(context, partId, version, 'ended_at = coalesce(ended_at, $now)', {
      now: context.now,
    });
    return noted(context, 'part ended', partId);
  });
}

export function resumePart(context: Context, partId: string, version: number): Promise<Part> {
  return withTenant(context, async () => {
    await update(context, partId, version, 'ended_at = null', {});
    return noted(context, 'part resumed', partId);
  });
}

async function update(
  context: Context,
  partId: string,
  version: number,
  set: string,
  bind: Bind,
): Promise<void> {
  const key = { shopId: context.shopId, partId };
  await orStale(
    await write(
      `update parts set ${set} where shop_id = $shopId and id = $partId and version = $version
       returning id`,
      { ...bind, ...key, version },
    ),
    () => row('select 1 from parts where shop_id = $shopId and id = $partId', key),
  );
}

async function refuseTaken(context: Context, number: string, exceptId: string | null) {
  const other = await row(
    `select 1 from parts where shop_id = $shopId and number = $number
       and id is distinct from $exceptId::uuid`,
    { shopId: context.shopId, number, exceptId },
  );
  if (other) throw invalid([{ pointer: '/number', detail: 'is the number of another part' }]);
}

async function refuseWrongSuccessor(context: Context, partId: string, supersededBy: string) {
  const pointer = '/supersededBy';
  const part = await row('select 1 from parts where shop_id = $shopId and id = $supersededBy', {
    shopId: context.shopId,
    supersededBy,
  });
  if (!part) throw invalid([{ pointer, detail: 'is no part of the shop' }]);
  if (await leadsBack(context, partId, supersededBy)) {
    throw invalid([{ pointer, detail: 'leads back to this part' }]);
  }
}

async function noted(context: Context, what: string, partId: string): Promise<Part> {
  await record(context, what, { kind: 'part', id: partId });
  await announce(context, 'parts', partId);
  return showPart(context, partId);
}

function present(row: PartRow, successor: Successor | undefined): Part {
  return {
    id: row.id,
    number: row.number,
    name: row.name,
    category: row.category,
    unitCost: row.unitCost,
    fixedPrice: row.fixedPrice,
    makersPart: row.makersPart,
    scarce: row.scarce,
    supplier: row.supplier,
    successor: successor ?? null,
    supersededBy: row.supersededBy,
    endedAt: instantOrNull(row.endedAt),
    version: row.version,
  };
}
