import { computed, inject, Injectable, type Signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { type Choice } from '@lib/ui';
import { EMPTY, expand, map, reduce } from 'rxjs';
import { ClientsApi } from './clients-api';

/** The clients a form offers to choose from, all pages of them. */
@Injectable({ providedIn: 'root' })
export class ClientChoices {
  readonly #api = inject(ClientsApi);

  /** Call it where injection is possible. */
  current(): Signal<readonly Choice[]> {
    const all = rxResource({ stream: () => this.#all() });
    return computed(() => (all.hasValue() ? all.value() : []));
  }

  #all() {
    const page = (cursor?: string) => this.#api.list({ limit: 100, cursor });
    return page().pipe(
      expand(({ next }) => (next ? page(next) : EMPTY)),
      map(({ items }) => items.map(({ id, name }) => ({ value: id, label: name }))),
      reduce((sofar, choices) => [...sofar, ...choices], [] as Choice[]),
    );
  }
}
