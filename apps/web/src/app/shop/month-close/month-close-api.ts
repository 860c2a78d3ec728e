import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Preview = AnswerOf<'statements.closePreview'>;
export type StoreToClose = Preview['stores'][number];
export type Run = AnswerOf<'statements.run'>;
export type RunItem = AnswerOf<'statements.runs'>['items'][number];

@Injectable({ providedIn: 'root' })
export class MonthCloseApi {
  readonly #api = inject(Api);

  /** Of the month that is due when none is named. */
  preview(month: string | undefined) {
    return this.#api.call('statements.closePreview', { query: { month } });
  }

  close(month: string, key: string) {
    return this.#api.call('statements.close', { body: { month }, key });
  }

  runs(query: QueryOf<'statements.runs'>) {
    return this.#api.call('statements.runs', { query });
  }

  run(runId: string) {
    return this.#api.call('statements.run', { params: { runId } });
  }

  hold(runId: string) {
    return this.#api.call('statements.hold', { params: { runId } });
  }

  goOn(runId: string) {
    return this.#api.call('statements.goOn', { params: { runId } });
  }
}
