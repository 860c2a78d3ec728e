import { inject, Injectable } from '@angular/core';
import { catchError, from, map, mergeMap, type Observable, of, reduce } from 'rxjs';
import { PartsApi } from '../parts/parts-api';

const atOnce = 6;

/** What the parts are called that a price book names by their ids. */
@Injectable({ providedIn: 'root' })
export class PartNames {
  readonly #api = inject(PartsApi);
  readonly #known = new Map<string, string>();

  of(partIds: readonly string[]): Observable<ReadonlyMap<string, string>> {
    const unknown = [...new Set(partIds)].filter((id) => !this.#known.has(id));
    return from(unknown).pipe(
      mergeMap((id) => this.#nameOf(id), atOnce),
      reduce((known) => known, null),
      map(() => new Map(this.#known)),
    );
  }

  #nameOf(id: string): Observable<unknown> {
    return this.#api.show(id).pipe(
      map(({ number, name }) => this.#known.set(id, `${number}, ${name}`)),
      // A name that cannot be had must not keep the prices from being read.
      catchError(() => of(null)),
    );
  }
}
