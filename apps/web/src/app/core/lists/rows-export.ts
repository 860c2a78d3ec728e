import { inject, Injectable, signal } from '@angular/core';
import { csvRow, csvStart } from '@lib/domain/csv/csv-row';
import { amountField } from '@lib/ui/format/money';
import { Reading } from '@lib/ui/format/reading';
import { type ListPage } from '@lib/ui/list/list-state';
import { problemText } from '@lib/ui/notes/problem-text';
import { counted } from '@lib/ui/words/words';
import { EMPTY, expand, firstValueFrom, map, type Observable, reduce } from 'rxjs';
import { saveFile } from '../api/save-file';
import { Messages } from '../messages/messages';

/** What a column of the file is called, and its cell of a row; amounts in minor units. */
export interface Column<T> {
  readonly head: string;
  text?(row: T): string | number | null | undefined;
  amount?(row: T): number | null | undefined;
}

interface RowsToSave<T> {
  /** Of the file, without its ending. */
  readonly name: string;
  /** What the rows are, for the message: "statement". */
  readonly one: string;
  /** Several of them, where that is not simply with an s: "entries". */
  readonly many?: string;
  readonly columns: readonly Column<T>[];
  /** A page of the list as it is narrowed on screen. */
  page(asked: { limit: number; cursor?: string }): Observable<ListPage<T>>;
}

/** Hands what a list on screen shows, all pages of it, to the browser as CSV. */
@Injectable({ providedIn: 'root' })
export class RowsExport {
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly busy = signal(false);

  async save<T>({ name, one, many, columns, page }: RowsToSave<T>): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    try {
      const rows = await firstValueFrom(everyPage(page));
      const text = [
        csvRow(columns.map(({ head }) => head)),
        ...rows.map((row) => csvRow(columns.map((column) => this.#cell(column, row)))),
      ];
      const content = new Blob([csvStart, ...text], { type: 'text/csv;charset=utf-8' });
      saveFile({ name: `${name}.csv`, content });
      this.#messages.say(`${name}.csv holds ${counted(rows.length, one, many)}.`);
    } catch (problem) {
      this.#messages.say(problemText(problem));
    } finally {
      this.busy.set(false);
    }
  }

  #cell<T>(column: Column<T>, row: T): string {
    if (column.amount) return amountField(column.amount(row), this.#reading.currency());
    return String(column.text?.(row) ?? '');
  }
}

function everyPage<T>(page: RowsToSave<T>['page']): Observable<T[]> {
  return page({ limit: 100 }).pipe(
    expand(({ next }) => (next ? page({ limit: 100, cursor: next }) : EMPTY)),
    map(({ items }) => items),
    reduce((sofar, items) => [...sofar, ...items], [] as T[]),
  );
}
