import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Machine = AnswerOf<'machines.show'>;
export type MachineSummary = AnswerOf<'machines.list'>['items'][number];
export type NewMachine = BodyOf<'machines.create'>;
export type SettableState = BodyOf<'machines.setState'>['state'];
type Versioned = Pick<Machine, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class MachinesApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'machines.list'>) {
    return this.#api.call('machines.list', { query });
  }

  show(machineId: string) {
    return this.#api.call('machines.show', { params: { machineId } });
  }

  create(body: NewMachine, key: string) {
    return this.#api.call('machines.create', { body, key });
  }

  change({ id, version }: Versioned, body: BodyOf<'machines.change'>) {
    return this.#api.call('machines.change', {
      params: { machineId: id },
      body,
      ifMatch: version,
    });
  }

  setState({ id, version }: Versioned, body: BodyOf<'machines.setState'>) {
    return this.#api.call('machines.setState', {
      params: { machineId: id },
      body,
      ifMatch: version,
    });
  }

  retire({ id, version }: Versioned, words: string) {
    return this.#api.call('machines.retire', {
      params: { machineId: id },
      body: { words },
      ifMatch: version,
    });
  }

  move({ id, version }: Versioned, body: BodyOf<'machines.move'>) {
    return this.#api.call('machines.move', {
      params: { machineId: id },
      body,
      ifMatch: version,
    });
  }
}
