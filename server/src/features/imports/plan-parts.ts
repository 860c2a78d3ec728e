import { text as fields } from '@lib/contracts';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { rows, write } from '../../core/database/tenancy';
import { shopFacts } from '../../core/shop-facts';
import { money, text, yesNo } from './cells';
import { importedColumns } from './columns';
import { type CellError, changesOf, planned, type Planner, readCells } from './planned-row';
import { type TableRow } from './read-table';

const columns = importedColumns('parts');

interface PartFields {
  name: string;
  category: string;
  unitCost: number;
  fixedPrice: number | null;
  makersPart: boolean;
  scarce: boolean;
  supplier: string;
  /** The number of the part that took its place. */
  supersededBy: string | null;
}

interface PartCells extends PartFields {
  number: string;
}

interface StandingPart extends PartFields {
  id: string;
  number: string;
  endedAt: Date | null;
}

interface PartToWrite {
  id: string;
  is_new: boolean;
  number: string;
  name: string;
  category: string;
  unit_cost: number;
  fixed_price: number | null;
  makers_part: boolean;
  scarce: boolean;
  supplier: string;
  superseded_by: string | null;
}

function cellKinds(currency: string) {
  return {
    number: text(fields.line(60)),
    name: text(fields.line(160)),
    category: text(fields.line(40).toLowerCase()),
    unitCost: money(currency),
    fixedPrice: money(currency),
    makersPart: yesNo,
    scarce: yesNo,
    supplier: text(fields.line(80)),
    supersededBy: text(fields.line(60)),
  };
}

/** Parts by their numbers. A successor may stand in the shop or further down in the file. */
export async function partsPlanner(context: Context, table: TableRow[]): Promise<Planner> {
  const kinds = cellKinds((await shopFacts(context)).currency);
  const standing = await standingParts(context);
  const follows = new Map([...standing.values()].map((part) => [part.number, part.supersededBy]));
  const inFile = new Set(table.map((row) => row.cells.number ?? ''));
  for (const row of table) {
    if (row.cells.supersededBy) follows.set(row.cells.number ?? '', row.cells.supersededBy);
  }
  const rowOfNumber = new Map<string, number>();
  const toWrite: PartToWrite[] = [];

  function refuseSuccessor(cells: Partial<PartCells>, errors: CellError[]): void {
    const { supersededBy, number } = cells;
    if (supersededBy == null || number === undefined) return;
    const column = 'Superseded by';
    if (!standing.has(supersededBy) && !inFile.has(supersededBy)) {
      errors.push({ column, detail: 'is the number of no part, here or in the file' });
    }
    if (leadsTo(follows, supersededBy, number)) {
      errors.push({ column, detail: 'leads back to this part' });
    }
  }

  return {
    plan(row) {
      const errors: CellError[] = [];
      const cells = readCells<PartCells>(row, kinds, columns, errors);
      const label = `${row.cells.number ?? ''} ${row.cells.name ?? ''}`;
      const first = rowOfNumber.get(cells.number ?? '');
      if (first !== undefined) {
        errors.push({ column: 'Part number', detail: `stands in row ${first} already` });
      }
      const part = standing.get(cells.number ?? '');
      if (part?.endedAt) errors.push({ column: 'Part number', detail: 'is of a part that ended' });
      refuseSuccessor(cells, errors);
      if (errors.length || cells.number === undefined) return planned(row, label, { errors });
      rowOfNumber.set(cells.number, row.row);
      const changes = part ? changesOf<PartFields>(part, cells, kinds, columns) : [];
      if (!part || changes.length) {
        toWrite.push({
          id: part?.id ?? uuid(),
          is_new: !part,
          number: cells.number,
          name: cells.name ?? part?.name ?? '',
          category: cells.category ?? part?.category ?? '',
          unit_cost: cells.unitCost ?? part?.unitCost ?? 0,
          fixed_price: cells.fixedPrice ?? part?.fixedPrice ?? null,
          makers_part: cells.makersPart ?? part?.makersPart ?? true,
          scarce: cells.scarce ?? part?.scarce ?? false,
          supplier: cells.supplier ?? part?.supplier ?? '',
          superseded_by: cells.supersededBy ?? part?.supersededBy ?? null,
        });
      }
      return planned(row, label, { errors, changes, isNew: !part });
    },
    write: () => writeParts(context, toWrite),
    added: () => ({ stores: 0, machines: 0 }),
  };
}

function leadsTo(follows: Map<string, string | null>, from: string, to: string): boolean {
  let at: string | null | undefined = from;
  for (let step = 0; at != null && step <= follows.size; step++) {
    if (at === to) return true;
    at = follows.get(at);
  }
  return false;
}

async function writeParts(context: Context, parts: readonly PartToWrite[]): Promise<void> {
  const shopId = context.shopId;
  const partRows = `jsonb_to_recordset($rows::jsonb) as x(id uuid, number text, name text,
    category text, unit_cost bigint, fixed_price bigint, makers_part boolean, scarce boolean,
    supplier text, superseded_by text)`;
  await write(
    `insert into parts (shop_id, id, number, name, category, unit_cost, fixed_price, makers_part,
       scarce, supplier)
     select $shopId, x.id, x.number, x.name, x.category, x.unit_cost, x.fixed_price, x.makers_part,
       x.scarce, x.supplier from ${partRows}`,
    { shopId, rows: JSON.stringify(parts.filter((part) => part.is_new)) },
  );
  await write(
    `update parts p set name = x.name, category = x.category, unit_cost = x.unit_cost,
       fixed_price = x.fixed_price, makers_part = x.makers_part, scarce = x.scarce,
       supplier = x.supplier
     from ${partRows} where p.shop_id = $shopId and p.id = x.id`,
    { shopId, rows: JSON.stringify(parts.filter((part) => !part.is_new)) },
  );
  // Once every part of the file stands, numbers can be followed to them.
  await write(
    `update parts p set superseded_by = next.id from ${partRows}
     join parts next on next.shop_id = $shopId and next.number = x.superseded_by
     where p.shop_id = $shopId and p.id = x.id and p.superseded_by is distinct from next.id`,
    { shopId, rows: JSON.stringify(parts.filter((part) => part.superseded_by !== null)) },
  );
}

async function standingParts(context: Context): Promise<Map<string, StandingPart>> {
  const found = await rows<StandingPart>(
    `select p.id, p.number, p.name, p.category, p.unit_cost as "unitCost",
       p.fixed_price as "fixedPrice", p.makers_part as "makersPart", p.scarce, p.supplier,
       next.number as "supersededBy", p.ended_at as "endedAt"
     from parts p left join parts next on next.shop_id = p.shop_id and next.id = p.superseded_by
     where p.shop_id = $shopId`,
    { shopId: context.shopId },
  );
  return new Map(found.map((part) => [part.number, part]));
}
