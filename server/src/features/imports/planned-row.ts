import { type AnswerOf } from '../../core/http/route';
import { type CellKind, CellRefused } from './cells';
import { type Column } from './columns';
import { type TableRow } from './read-table';

type Row = AnswerOf<'imports.rows'>['items'][number];

/** What one row of a file would do, as it is shown to the person before anything is done. */
export type PlannedRow = Row;
export type CellError = Row['errors'][number];
export type CellChange = Row['changes'][number];

/** Turns the rows of a file into what they would do, and collects what is to be written. */
export interface Planner {
  plan(row: TableRow): PlannedRow;
  /** Writes everything that was planned, in the open tenant transaction. */
  write(): Promise<void>;
  /** How many stores and machines would be added, for the plan's limits. */
  added(): { stores: number; machines: number };
}

type Kinds<V> = { [K in keyof V]: CellKind<NonNullable<V[K]>> };

/** The values of the cells that hold anything; what cannot be read becomes an error of its column. */
export function readCells<V extends object>(
  table: TableRow,
  kinds: Kinds<V>,
  columns: readonly Column[],
  errors: CellError[],
): Partial<V> {
  const values: Partial<V> = {};
  if (table.tooLong) errors.push({ column: '', detail: 'has more cells than the header' });
  for (const column of columns) {
    const cell = table.cells[column.key] ?? '';
    if (cell === '') {
      if (column.required) errors.push({ column: column.header, detail: 'is missing' });
      continue;
    }
    const kind = (kinds as Record<string, CellKind<unknown> | undefined>)[column.key];
    if (!kind) continue;
    try {
      values[column.key as keyof V] = kind.read(cell) as V[keyof V];
    } catch (error) {
      if (!(error instanceof CellRefused)) throw error;
      errors.push({ column: column.header, detail: error.message });
    }
  }
  return values;
}

/** What the cells would change of what stands. An empty cell changes nothing. */
export function changesOf<V extends object>(
  standing: V,
  values: Partial<V>,
  kinds: Kinds<V>,
  columns: readonly Column[],
): CellChange[] {
  return columns.flatMap((column) => {
    const key = column.key as keyof V;
    const kind = kinds[key] as CellKind<unknown> | undefined;
    const to = values[key];
    if (!kind || to === undefined) return [];
    const from = standing[key];
    const fromText = from === null || from === undefined ? '' : kind.show(from);
    const toText = kind.show(to);
    return fromText === toText ? [] : [{ column: column.header, from: fromText, to: toText }];
  });
}

/** Puts together what a row would do. */
export function planned(
  table: TableRow,
  label: string,
  found: { errors: CellError[]; changes?: CellChange[]; isNew?: boolean },
): PlannedRow {
  const changes = found.changes ?? [];
  const outcome = found.errors.length
    ? 'bad'
    : found.isNew
      ? 'new'
      : changes.length
        ? 'changed'
        : 'unchanged';
  return {
    row: table.row,
    outcome,
    label: label.trim().slice(0, 200),
    errors: found.errors.slice(0, 20),
    changes: outcome === 'changed' ? changes : [],
  };
}
