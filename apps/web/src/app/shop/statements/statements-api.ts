import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Statement = AnswerOf<'statements.show'>;
export type StatementItem = AnswerOf<'statements.list'>['items'][number];
export type StatementState = StatementItem['state'];
export type StatedVisit = Statement['visits'][number];
export type StatedJob = StatedVisit['jobs'][number];

@Injectable({ providedIn: 'root' })
export class StatementsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'statements.list'>) {
    return this.#api.call('statements.list', { query });
  }

  show(statementId: string) {
    return this.#api.call('statements.show', { params: { statementId } });
  }

  mail(statementId: string) {
    return this.#api.call('statements.mail', { params: { statementId } });
  }
}
