import { computed, inject, Injectable, type Signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { type Choice } from '@lib/ui';
import { EMPTY, expand, map, type Observable, reduce } from 'rxjs';
import { type StoreSummary, StoresApi } from './stores-api';

/** The stores a form or a filter offers to choose from, all pages of them. */
@Injectable({ providedIn: 'root' })
export class StoreChoices {
  readonly #api = inject(StoresApi);

  /** Those that stand, each with its client's name. Call it where injection is possible. */
  current(): Signal<readonly Choice[]> {
    const all = rxResource({ stream: () => this.all() });
    return computed(() =>
      all.hasValue()
        ? all.value().map(({ id, name, client }) => ({
            value: id,
            label: `${name}, ${client.name}`,
          }))
        : [],
    );
  }

  all(clientId?: string): Observable<readonly StoreSummary[]> {
    const page = (cursor?: string) => this.#api.list({ clientId, limit: 100, cursor });
    return page().pipe(
      expand(({ next }) => (next ? page(next) : EMPTY)),
      map(({ items }) => items),
      reduce((sofar, items) => [...sofar, ...items], [] as StoreSummary[]),
    );
  }
}
