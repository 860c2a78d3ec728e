import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Machine = AnswerOf<'machines.show'>;
export type HistoryItem = AnswerOf<'machines.history'>['items'][number];
export type CallItem = AnswerOf<'calls.list'>['items'][number];

@Injectable({ providedIn: 'root' })
export class MachinesApi {
  readonly #api = inject(Api);

  show(machineId: string) {
    return this.#api.call('machines.show', { params: { machineId } });
  }

  history(machineId: string, query: QueryOf<'machines.history'>) {
    return this.#api.call('machines.history', { params: { machineId }, query });
  }

  calls(machineId: string) {
    return this.#api.call('calls.list', { query: { machineId, limit: 100 } });
  }
}
