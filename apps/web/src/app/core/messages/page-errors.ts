import { ErrorHandler, inject, Injectable, Injector } from '@angular/core';
import { isProblem } from '../api/problem';
import { Messages } from './messages';

/** Errors nobody caught: kept in the browser's log for us, and said in words to the person. */
@Injectable()
export class PageErrors extends ErrorHandler {
  // Looked up late: messages need the router, and errors can come before there is one.
  readonly #injector = inject(Injector);

  override handleError(error: unknown): void {
    super.handleError(error);
    const reason = (error as { rejection?: unknown } | undefined)?.rejection ?? error;
    this.#injector
      .get(Messages)
      .say(
        isProblem(reason)
          ? reason.message
          : 'Something went wrong on this page. Reload it; what was saved is kept.',
        { label: 'Reload', run: () => location.reload() },
      );
  }
}
