/**
 * Cells that a spreadsheet would take for a formula. Source: OWASP, "CSV Injection": a cell that
 * begins with `=`, `+`, `-`, `@`, tab, carriage return or line feed; a single quote before it
 * makes the spreadsheet read text. Full-width signs count, because some spreadsheets read them as
 * the plain ones. So does what stands behind white space or a NUL, because some drop these first.
 */
const startsFormula = /^[\s\u0000\ufeff]*[=+\-@\uff1d\uff0b\uff0d\uff20]|^[\t\r\n]/;

/** `-12.50`: a plain negative number is no formula, and a column of amounts must stay one. */
const plainNegative = /^-\d+(?:\.\d+)?$/;

/** What `neutraliseFormula` has put a quote before, or would have to tell from it. */
const quoted = /^'+/;

/**
 * The cell as it may stand in a CSV file: with a single quote before it when a spreadsheet would
 * take it for a formula. Plain negative numbers stay numbers; `+1 555 0100` and `-2+3` don't.
 *
 * Text that already begins with quotes before such a sign gets one more, so that
 * `restoreCell(neutraliseFormula(cell))` is always the cell. Separators and double quotes are the
 * CSV writer's to escape, afterwards (RFC 4180).
 */
export function neutraliseFormula(cell: string): string {
  if (plainNegative.test(cell)) return cell;
  return startsFormula.test(cell.replace(quoted, '')) ? `'${cell}` : cell;
}

/** The cell of a file of ours as it was before it was neutralised; other cells as they are. */
export function restoreCell(cell: string): string {
  if (!cell.startsWith("'")) return cell;
  return startsFormula.test(cell.replace(quoted, '')) ? cell.slice(1) : cell;
}
