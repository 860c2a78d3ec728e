import { values } from '@lib/contracts';
import { amountFromDecimal, decimalFromAmount, isIsoDate } from '@lib/domain';
import { type z } from 'zod';

const { amount } = values;

/** What a cell may hold: how it is read, and how a value that stands is written for comparison. */
export interface CellKind<T> {
  /** @throws CellRefused in words that fit behind the name of the column */
  read(cell: string): T;
  show(value: T): string;
}

export class CellRefused extends Error {}

/** Text as a form takes it: the contract of the field says what is right. */
export function text(schema: z.ZodType<string>): CellKind<string> {
  return {
    read(cell) {
      const read = schema.safeParse(cell);
      if (read.success) return read.data;
      throw new CellRefused(read.error.issues[0]?.message ?? 'is not right');
    },
    show: (value) => value,
  };
}

export const dayCell: CellKind<string> = {
  read(cell) {
    if (!isIsoDate(cell)) throw new CellRefused('is not a day written like 2031-04-30');
    return cell;
  },
  show: (value) => value,
};

/** A number with at most so many decimals, with a point or a comma before them. */
export function decimal(decimals: number, max: number): CellKind<number> {
  const shape = new RegExp(`^\\d{1,12}${decimals ? `([.,]\\d{1,${decimals}})?` : ''}$`);
  return {
    read(cell) {
      const value = Number(cell.replace(',', '.'));
      if (!shape.test(cell) || value > max) {
        const example = decimals ? ` with at most ${decimals} decimals` : '';
        throw new CellRefused(`is not a number from 0 to ${max}${example}`);
      }
      return value;
    },
    show: (value) => String(value),
  };
}

/** An amount in the shop's currency, kept in minor units. Thousands are not separated. */
export function money(currency: string): CellKind<number> {
  return {
    read(cell) {
      try {
        return amount.parse(amountFromDecimal(cell.replace(',', '.'), currency));
      } catch {
        const example = decimalFromAmount(1250, currency);
        throw new CellRefused(`is not an amount written like ${example}`);
      }
    },
    show: (value) => decimalFromAmount(value, currency),
  };
}

/** One of a closed set: its stored word, or as people write it. */
export function choice<T extends string>(words: readonly T[]): CellKind<T> {
  return {
    read(cell) {
      const word = cell.toLowerCase().replace(/[\s-]+/g, '_');
      const value = words.find((each) => each === word);
      if (!value) throw new CellRefused(`is none of ${words.map(spoken).join(', ')}`);
      return value;
    },
    show: spoken,
  };
}

/** `top_loader` as people write it: Top loader. */
export function spoken(word: string): string {
  return word.charAt(0).toUpperCase() + word.slice(1).replaceAll('_', ' ');
}

const yesWords = ['yes', 'y', 'true', '1'];
const noWords = ['no', 'n', 'false', '0'];

export const yesNo: CellKind<boolean> = {
  read(cell) {
    const word = cell.toLowerCase();
    if (yesWords.includes(word)) return true;
    if (noWords.includes(word)) return false;
    throw new CellRefused('is neither yes nor no');
  },
  show: (value) => (value ? 'yes' : 'no'),
};
