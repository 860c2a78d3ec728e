import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type TrialBalance = AnswerOf<'ledger.trialBalance'>;
export type AccountBalance = TrialBalance['accounts'][number];
export type AccountCode = AccountBalance['account'];
export type Entry = AnswerOf<'ledger.entries'>['items'][number];
export type DocumentKind = Entry['documentKind'];

@Injectable({ providedIn: 'root' })
export class LedgerApi {
  readonly #api = inject(Api);

  trialBalance(on: string | undefined) {
    return this.#api.call('ledger.trialBalance', { query: { on } });
  }

  entries(query: QueryOf<'ledger.entries'>) {
    return this.#api.call('ledger.entries', { query });
  }

  journal(query: QueryOf<'ledger.journal'>) {
    return this.#api.file('ledger.journal', { query });
  }
}
