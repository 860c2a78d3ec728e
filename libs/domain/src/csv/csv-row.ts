import { neutraliseFormula } from './formula-cell';

/**
 * One row of a CSV file (RFC 4180): cells in quotation marks where they need them, and none that a
 * spreadsheet would take for a formula.
 */
export function csvRow(cells: readonly string[]): string {
  return `${cells.map(csvCell).join(',')}\r\n`;
}

function csvCell(cell: string): string {
  const safe = neutraliseFormula(cell);
  return /[",\r\n]/.test(safe) || safe !== safe.trim() ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** Begins a file: by the byte order mark a spreadsheet knows that it is UTF-8. */
export const csvStart = '\ufeff';
