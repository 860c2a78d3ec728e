import { type ProblemDocument, problemTypes } from '@lib/contracts';
import { type ErrorRequestHandler } from 'express';
import { type Log } from '../logging';
import { problemFromError } from '../problems/from-error';

/** The last handler: every failure leaves as an RFC 9457 problem document, without internals. */
export function problemHandler(log: Log): ErrorRequestHandler {
  return (error, request, response, _next) => {
    const problem = problemFromError(error);
    if (problem.status >= 500) log.error({ err: error, requestId: request.id }, 'request failed');
    if (response.headersSent) {
      response.destroy();
      return;
    }
    const document: ProblemDocument = {
      type: `/problems/${problem.type}`,
      title: problemTypes[problem.type].title,
      status: problem.status,
      ...(problem.detail ? { detail: problem.detail } : {}),
      requestId: String(request.id),
      ...(problem.errors?.length ? { errors: problem.errors } : {}),
    };
    response
      .status(problem.status)
      .set(problem.headers)
      .set('Cache-Control', 'no-store')
      .type('application/problem+json')
      .send(JSON.stringify(document));
  };
}
