import { restoreCell } from '@lib/domain';
import { type CsvError, parse } from 'csv-parse/sync';
import { type Column } from './columns';
import { FileRefused } from './file-refused';

/** One row of a file: its cells by the keys of their columns, trimmed. */
export interface TableRow {
  /** As a spreadsheet counts: the header is row 1, and a cell with line breaks is one row. */
  row: number;
  cells: Record<string, string>;
  /** Holds more cells than the header. */
  tooLong: boolean;
}

const mostRows = 20_000;
const delimiters = [',', ';', '\t'] as const;

/** What separates the cells: what makes most of the first row known column names. */
export function delimiterOf(text: string, columns: readonly Column[]): string {
  let best: { delimiter: string; known: number } = { delimiter: ',', known: -1 };
  for (const delimiter of delimiters) {
    const header = parseCsv(text, delimiter, 1)[0] ?? [];
    const known = header.filter((name) => columnNamed(name, columns)).length;
    if (known > best.known) best = { delimiter, known };
  }
  return best.delimiter;
}

/** Reads the header alone: which column stands where. Refuses a file that cannot be the right one. */
export function readHeader(
  text: string,
  delimiter: string,
  columns: readonly Column[],
): (Column | undefined)[] {
  const header = parseCsv(text, delimiter, 1)[0] ?? [];
  const places = header.map((name) => columnNamed(name, columns));
  const unknown = header.filter((name, i) => name.trim() !== '' && !places[i]);
  const missing = columns.filter((c) => c.required && !places.includes(c)).map((c) => c.header);
  const twice = places.filter((c, i) => c && places.indexOf(c) !== i).map((c) => c?.header);
  if (missing.length) throw new FileRefused(`The file has no column ${quoted(missing)}.`);
  if (twice.length) throw new FileRefused(`The column ${quoted(twice)} stands there twice.`);
  if (unknown.length) {
    throw new FileRefused(
      `The column ${quoted(unknown)} is not known: rename it as in the template, or leave it out.`,
    );
  }
  return places;
}

/** Every row below the header that holds anything. */
export function readTable(text: string, columns: readonly Column[]): TableRow[] {
  const delimiter = delimiterOf(text, columns);
  const places = readHeader(text, delimiter, columns);
  const records = parseCsv(text, delimiter);
  const rows: TableRow[] = [];
  for (const [index, record] of records.entries()) {
    if (index === 0 || record.every((cell) => cell.trim() === '')) continue;
    const cells: Record<string, string> = {};
    for (const [i, column] of places.entries()) {
      if (column) cells[column.key] = restoreCell(record[i] ?? '').trim();
    }
    const tooLong = record.slice(places.length).some((cell) => cell.trim() !== '');
    rows.push({ row: index + 1, cells, tooLong });
  }
  if (!rows.length) throw new FileRefused('The file has no rows below its header.');
  if (rows.length > mostRows) {
    throw new FileRefused(
      `The file has ${rows.length} rows; ${mostRows} is the most: send it in several files.`,
    );
  }
  return rows;
}

function parseCsv(text: string, delimiter: string, to = -1): string[][] {
  try {
    return parse(text, {
      delimiter,
      bom: true,
      relax_column_count: true,
      max_record_size: 200_000,
      ...(to > 0 ? { to } : {}),
    });
  } catch (error) {
    if (to > 0) return [];
    const { code, records, lines } = error as CsvError & { records?: number; lines?: number };
    const where = lines === undefined ? '' : ` near line ${lines}`;
    const row = records === undefined ? '' : ` (row ${records + 1})`;
    throw new FileRefused(
      code === 'CSV_MAX_RECORD_SIZE'
        ? `A row${where} is too long: a quotation mark before it may not be closed.`
        : `The quotation marks${where}${row} do not fit together: a cell with one is put in quotation marks, and it is doubled.`,
    );
  }
}

function columnNamed(name: string, columns: readonly Column[]): Column | undefined {
  const folded = fold(name);
  return columns.find((column) => fold(column.header) === folded);
}

function fold(name: string): string {
  return name
    .toLowerCase()
    .replaceAll('’', "'")
    .replace(/[\s_-]+/g, ' ')
    .replace(/^\ufeff/, '')
    .trim();
}

function quoted(names: readonly (string | undefined)[]): string {
  return names
    .slice(0, 5)
    .map((name) => `“${(name ?? '').slice(0, 60)}”`)
    .join(', ');
}
