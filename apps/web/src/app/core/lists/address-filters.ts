import { effect, inject } from '@angular/core';
import { ActivatedRoute, Router } from '@angular/router';

type Filters = Readonly<Record<string, string>>;

/**
 * The filters a list begins with: those of the address, so that a link can lead to a narrowed list.
 * Call it where injection is possible.
 */
export function filtersFromAddress<F extends Filters>(any: F): F {
  const { queryParamMap } = inject(ActivatedRoute).snapshot;
  const found = Object.keys(any).map((name) => [name, queryParamMap.get(name) ?? any[name]]);
  return Object.fromEntries(found) as F;
}

/** Writes the filters into the address, so that the way back leads to the same narrowed list. */
export function keepInAddress(list: { filters(): Filters }): void {
  const route = inject(ActivatedRoute);
  const router = inject(Router);
  effect(() => {
    const entries = Object.entries(list.filters());
    const { queryParamMap } = route.snapshot;
    if (entries.every(([name, value]) => (queryParamMap.get(name) ?? '') === value)) return;
    const queryParams = Object.fromEntries(entries.map(([name, value]) => [name, value || null]));
    void router.navigate([], {
      relativeTo: route,
      queryParams,
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  });
}
