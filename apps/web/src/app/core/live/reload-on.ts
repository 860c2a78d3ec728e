import { inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { type LiveKind } from '@lib/contracts/web';
import { auditTime } from 'rxjs';
import { Live } from './live';

/** Many changes at once, as an import makes them, are asked for once. */
const burst = 300;

/**
 * Loads a resource or list anew when something of these kinds changed in the shop. Call it where
 * injection is possible: `reloadOn(this.store, 'stores', 'machines')`.
 */
export function reloadOn(thing: { reload(): unknown }, ...kinds: readonly LiveKind[]): void {
  inject(Live)
    .of(...kinds)
    .pipe(auditTime(burst), takeUntilDestroyed())
    .subscribe(() => thing.reload());
}
