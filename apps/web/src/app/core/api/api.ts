import { HttpClient, HttpContext, HttpErrorResponse } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type OperationId } from '@lib/contracts/web';
import { catchError, from, map, type Observable, switchMap, throwError } from 'rxjs';
import { type Problem, problemFrom } from './problem';
import { requestOf, type SentArgs } from './request-of';

export interface AnsweredFile {
  readonly name: string;
  readonly content: Blob;
}

/**
 * Every call to the server, typed by the contracts:
 *
 *     this.#api.call('stores.change', { params: { storeId }, body, ifMatch: store.version })
 *
 * A call that fails ends with a `Problem`.
 */
@Injectable({ providedIn: 'root' })
export class Api {
  readonly #http = inject(HttpClient);

  call<Id extends OperationId>(id: Id, ...args: SentArgs<Id>): Observable<AnswerOf<Id>> {
    return this.callWith(new HttpContext(), id, ...args);
  }

  /** As `call`, with what interceptors should know about it. */
  callWith<Id extends OperationId>(
    context: HttpContext,
    id: Id,
    ...[sent]: SentArgs<Id>
  ): Observable<AnswerOf<Id>> {
    const { method, url, query, headers, body } = requestOf(id, sent);
    return this.#http
      .request<AnswerOf<Id>>(method, url, { context, params: query, headers, body })
      .pipe(catchError((error: unknown) => throwError(() => problemFrom(error))));
  }

  /** For operations that answer with a file: a PDF, a CSV, a picture. */
  file<Id extends OperationId>(id: Id, ...[sent]: SentArgs<Id>): Observable<AnsweredFile> {
    const { method, url, query, headers, body } = requestOf(id, sent);
    return this.#http
      .request(method, url, {
        params: query,
        headers,
        body,
        observe: 'response',
        responseType: 'blob',
      })
      .pipe(
        map((response) => ({
          name: fileName(response.headers.get('Content-Disposition')) ?? id,
          content: response.body ?? new Blob(),
        })),
        catchError((error: unknown) =>
          from(problemInBlob(error)).pipe(switchMap((problem) => throwError(() => problem))),
        ),
      );
  }
}

/** Where a file was expected, a problem document arrives as a blob too. */
async function problemInBlob(error: unknown): Promise<Problem> {
  if (!(error instanceof HttpErrorResponse) || !(error.error instanceof Blob)) {
    return problemFrom(error);
  }
  const { status, statusText, error: blob } = error;
  return problemFrom(new HttpErrorResponse({ status, statusText, error: await blob.text() }));
}

function fileName(disposition: string | null): string | undefined {
  return /filename="?([^";]+)"?/.exec(disposition ?? '')?.[1];
}
